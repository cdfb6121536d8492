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

    public async Task<IActionResult> OnGetAsync(long id)
    {
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
}
