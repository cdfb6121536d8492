using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documents;

internal sealed class ProtocolListModel(ReadDocuments useCase) : LedgerPage
{
    private const int OnePage = 50;

    public static RoleRule Rule => ReadDocuments.Rule;

    public string? Find { get; private set; }

    public string? Next { get; private set; }

    public IReadOnlyList<DocumentSummary> Protocols { get; private set; } = [];

    public async Task<IActionResult> OnGetAsync(string? find, string? after)
    {
        Find = string.IsNullOrWhiteSpace(find) ? null : find.Trim();
        var found = Find is null
            ? await useCase.ListAsync(Caller, DocumentKind.Protocol, after, OnePage, Cancellation)
            : await useCase.ListAsync(Caller, DocumentKind.Protocol, null, 200, Cancellation);
        if (!found.Succeeded)
            return Refuse(found.Refusal);
        Protocols = Find is null ? found.Value : [.. found.Value.Where(Fits)];
        Next = Find is null && found.Value.Count == OnePage ? found.Value[^1].Id : null;
        var only = Find is null ? null : Protocols.FirstOrDefault(protocol => protocol.Id == Find) ?? (Protocols.Count == 1 ? Protocols[0] : null);
        return only is not null ? LocalRedirect($"/protocols/{only.Id}") : Page();
    }

    /// <summary>Every word stands somewhere in the title, the identifier or a scanner's name.</summary>
    private bool Fits(DocumentSummary protocol)
    {
        var text = string.Join(' ', [protocol.Title, protocol.Id, .. protocol.Effective.Select(interval => interval.Scanner)]);
        return Find!.Split(' ', StringSplitOptions.RemoveEmptyEntries).All(word => text.Contains(word, StringComparison.OrdinalIgnoreCase));
    }
}
