using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Runs;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Runs;

/// <summary>Two completed runs side by side.</summary>
internal sealed class CompareModel(ReadRuns read, CompareRuns compare) : LedgerPage
{
    private const int Offered = 60;

    public static RoleRule Rule => CompareRuns.Rule;

    public long? From { get; private set; }

    public long? To { get; private set; }

    public IReadOnlyList<RunView> Runs { get; private set; } = [];

    public RunComparison? Comparison { get; private set; }

    public async Task<IActionResult> OnGetAsync(long? from, long? to)
    {
        (From, To) = (from, to);
        var listed = await read.ListAsync(Caller, null, Offered, Cancellation);
        if (!listed.Succeeded)
            return Refuse(listed.Refusal);
        Runs = listed.Value;
        if (from is not { } older || to is not { } newer)
            return Page();
        var compared = await compare.RunAsync(Caller, older, newer, Cancellation);
        if (!compared.Succeeded)
            return Refuse(compared.Refusal);
        Comparison = compared.Value;
        return Page();
    }
}
