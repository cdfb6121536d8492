using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>One version on one printable page: text, series, and for each value the way to why it is so.</summary>
internal sealed class SheetModel(ReadDocuments useCase) : LedgerPage
{
    public static RoleRule Rule => ReadDocuments.Rule;

    public string Folder { get; private set; } = "";

    public DocumentKey Key { get; private set; }

    public string Title { get; private set; } = "";

    public int Newest { get; private set; }

    public VersionSummary Version { get; private set; } = null!;

    public DocumentRowsView Rows { get; private set; } = null!;

    public async Task<IActionResult> OnGetAsync(string folder, string id, int? version)
    {
        (Folder, Key) = (folder, Folders.Key(folder, id));
        var newest = await useCase.VersionAsync(Caller, Key, null, Cancellation);
        if (!newest.Succeeded)
            return Absent(newest.Refusal);
        var found = version is null ? newest : await useCase.VersionAsync(Caller, Key, version, Cancellation);
        if (!found.Succeeded)
            return Absent(found.Refusal);
        (Version, Title, Newest) = (found.Value.Summary, found.Value.Document.Title, newest.Value.Summary.Version);
        Rows = new DocumentRowsView($"/{folder}/{id}/{Version.Version}", DocumentRows.Of(Key.Kind, found.Value.Bytes));
        return Page();
    }
}
