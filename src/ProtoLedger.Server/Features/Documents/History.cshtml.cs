using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Bundles;
using ProtoLedger.Application.Documents;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>All versions of a document, and what changed between two of them.</summary>
internal sealed class HistoryModel(ReadDocuments useCase) : LedgerPage
{
    public static RoleRule Rule => ReadDocuments.Rule;

    public string Folder { get; private set; } = "";

    public DocumentKey Key { get; private set; }

    /// <summary>The binder is for one protocol.</summary>
    public bool MayTakeBinder => Key.Kind == DocumentKind.Protocol && ExportBundle.Rule.Allows(Actor);

    public int? From { get; private set; }

    public int? To { get; private set; }

    public IReadOnlyList<VersionSummary> Versions { get; private set; } = [];

    public IReadOnlyList<ParameterChange>? Changes { get; private set; }

    public async Task<IActionResult> OnGetAsync(string folder, string id, int? from, int? to)
    {
        (Folder, Key, From, To) = (folder, Folders.Key(folder, id), from, to);
        var versions = await useCase.VersionsAsync(Caller, Key, Cancellation);
        if (!versions.Succeeded)
            return Absent(versions.Refusal);
        Versions = versions.Value;
        if (from is { } older && to is { } newer)
        {
            var changes = await useCase.CompareAsync(Caller, Key, older, newer, Cancellation);
            if (!changes.Succeeded)
                return Absent(changes.Refusal);
            Changes = changes.Value;
        }

        return Page();
    }
}
