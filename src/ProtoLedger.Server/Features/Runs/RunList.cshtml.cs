using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Runs;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Runs;

internal sealed class RunListModel(ReadRuns read, EnqueueRun enqueue) : LedgerPage
{
    private const int OnePage = 40;

    public static RoleRule Rule => ReadRuns.Rule;

    public IReadOnlyList<RunView> Runs { get; private set; } = [];

    public long? Before { get; private set; }

    public bool MayStart => EnqueueRun.Rule.Allows(Actor);

    public async Task<IActionResult> OnGetAsync(long? before)
    {
        var found = await read.ListAsync(Caller, before, OnePage, Cancellation);
        if (!found.Succeeded)
            return Refuse(found.Refusal);
        Runs = found.Value;
        Before = Runs.Count == OnePage ? Runs[^1].Id : null;
        return Page();
    }

    public async Task<IActionResult> OnPostAsync(string? formKey)
    {
        var queued = await enqueue.RunAsync(Sender(formKey), RunCause.Manual, Cancellation);
        return queued.Succeeded ? LocalRedirect($"/runs/{queued.Value}") : Refuse(queued.Refusal);
    }
}
