using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Stores;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Audit;

internal sealed class AuditTrailModel(ReadAudit useCase) : LedgerPage
{
    private const int OnePage = 100;

    public static RoleRule Rule => ReadAudit.Rule;

    public static IReadOnlyList<string> Outcomes { get; } = ["done", "denied", "failed", "read"];

    public string? Name { get; private set; }

    public string? Outcome { get; private set; }

    public long? Before { get; private set; }

    public IReadOnlyList<AuditEvent> Events { get; private set; } = [];

    public async Task<IActionResult> OnGetAsync(string? actor, string? outcome, long? before)
    {
        (Name, Outcome) = (string.IsNullOrWhiteSpace(actor) ? null : actor.Trim(), Outcomes.Contains(outcome) ? outcome : null);
        var found = await useCase.ListAsync(Caller, new AuditFilter(Name, null, Outcome, null, null, before, OnePage), Cancellation);
        if (!found.Succeeded)
            return Refuse(found.Refusal);
        Events = found.Value;
        Before = Events.Count == OnePage ? Events[^1].Number : null;
        return Page();
    }
}
