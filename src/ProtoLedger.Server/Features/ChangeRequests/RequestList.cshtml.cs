using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.ChangeRequests;

internal sealed class RequestListModel(ReadChangeRequests useCase) : LedgerPage
{
    private const int OnePage = 40;

    public static RoleRule Rule => ReadChangeRequests.Rule;

    public string? State { get; private set; }

    public string? Document { get; private set; }

    public long? Before { get; private set; }

    public IReadOnlyList<ChangeRequestView> Requests { get; private set; } = [];

    public async Task<IActionResult> OnGetAsync(string? state, string? document, long? before)
    {
        State = ChangeRequestStates.All.Contains(state) ? state : null;
        Document = string.IsNullOrWhiteSpace(document) ? null : document.Trim();
        var filter = new ChangeRequestFilter(
            State is null ? null : ChangeRequestStates.FromWord(State),
            Document is null ? null : new DocumentKey(DocumentKind.Protocol, Document),
            Before: before,
            Limit: OnePage);
        var found = await useCase.ListAsync(Caller, filter, Cancellation);
        if (!found.Succeeded)
            return Refuse(found.Refusal);
        Requests = found.Value;
        Before = Requests.Count == OnePage ? Requests[^1].Id : null;
        return Page();
    }
}
