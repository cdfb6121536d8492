using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Runs;

internal sealed class RunModel(ReadRuns read, CompareRuns compare) : LedgerPage
{
    public static RoleRule Rule => ReadRuns.Rule;

    public RunView Run { get; private set; } = null!;

    public RunProgress? Progress { get; private set; }

    public RunFindings? Findings { get; private set; }

    /// <summary>A word that the findings shown must hold, or null.</summary>
    public string? Only { get; private set; }

    public IReadOnlyList<ChangedVerdict> NewlyFailing => [.. Findings!.NewlyFailing.Where(Fits)];

    public IReadOnlyList<ChangedVerdict> NewlyHolding => [.. Findings!.NewlyHolding.Where(Fits)];

    public IReadOnlyList<MovedVersion> Moved => [.. Findings!.Moved.Where(moved => Fits(moved.Result.Protocol, moved.Result.Scanner))];

    public async Task<IActionResult> OnGetAsync(long id, string? only)
    {
        Only = string.IsNullOrWhiteSpace(only) ? null : only.Trim();
        var found = await read.GetAsync(Caller, id, Cancellation);
        if (!found.Succeeded)
            return Absent(found.Refusal);
        Run = found.Value;
        if (Run.FinishedAt is null)
            Progress = (await read.ProgressAsync(Caller, id, Cancellation)).Value;
        else
            Findings = (await compare.FindingsAsync(Caller, id, Cancellation)).Value;
        return Page();
    }

    private bool Fits(ChangedVerdict verdict) => Fits(verdict.Result.Protocol, verdict.Result.Scanner, verdict.Expectation);

    private bool Fits(params string[] texts) => Only is null || texts.Any(text => text.Contains(Only, StringComparison.OrdinalIgnoreCase));
}
