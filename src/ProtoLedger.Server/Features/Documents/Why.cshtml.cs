using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>Why one parameter is what it is.</summary>
internal sealed class WhyModel(ReadDocuments useCase) : LedgerPage
{
    public static RoleRule Rule => ReadDocuments.Rule;

    public string Folder { get; private set; } = "";

    public ParameterProvenance Answer { get; private set; } = null!;

    public async Task<IActionResult> OnGetAsync(string folder, string id, int version, string? pointer)
    {
        Folder = folder;
        var found = await useCase.ProvenanceAsync(Caller, Folders.Key(folder, id), version, pointer ?? "", Cancellation);
        if (!found.Succeeded)
            return Absent(found.Refusal);
        Answer = found.Value;
        return Page();
    }
}
