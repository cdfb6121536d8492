using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>Scanners, conditions, catalogue and expectations.</summary>
internal sealed class ReferencesModel(ReadDocuments useCase) : LedgerPage
{
    private static readonly (DocumentKind Kind, string Title)[] Titles =
    [
        (DocumentKind.Scanner, "Scanners"), (DocumentKind.Conditions, "B0 and B1 conditions"),
        (DocumentKind.Catalogue, "Tissue catalogue"), (DocumentKind.Expectations, "Expectations"),
    ];

    public static RoleRule Rule => ReadDocuments.Rule;

    public IReadOnlyList<(string Title, string Folder, IReadOnlyList<DocumentSummary> Documents)> Kinds { get; private set; } = [];

    public async Task OnGetAsync()
    {
        var kinds = new List<(string, string, IReadOnlyList<DocumentSummary>)>();
        foreach (var (kind, title) in Titles)
            kinds.Add((title, Folders.Of(kind), (await useCase.ListAsync(Caller, kind, null, 200, Cancellation)).Value ?? []));
        Kinds = kinds;
    }
}
