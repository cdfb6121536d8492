using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>Date, unit, protocol: what was effective.</summary>
internal sealed class EffectiveModel(ReadDocuments useCase) : LedgerPage
{
    public static RoleRule Rule => ReadDocuments.Rule;

    public DateTime? At { get; private set; }

    public string? Scanner { get; private set; }

    public string? Protocol { get; private set; }

    public IReadOnlyList<DocumentSummary> Scanners { get; private set; } = [];

    public IReadOnlyList<DocumentSummary> Protocols { get; private set; } = [];

    public EffectiveAnswer? Answer { get; private set; }

    public async Task<IActionResult> OnGetAsync(DateTime? at, string? scanner, string? protocol)
    {
        (At, Scanner, Protocol) = (at, Named(scanner), Named(protocol));
        Scanners = (await useCase.ListAsync(Caller, DocumentKind.Scanner, null, 200, Cancellation)).Value ?? [];
        Protocols = (await useCase.ListAsync(Caller, DocumentKind.Protocol, null, 200, Cancellation)).Value ?? [];
        var found = await useCase.EffectiveAsync(Caller, Protocol, Scanner, at is { } time ? DateTime.SpecifyKind(time, DateTimeKind.Utc) : null, Cancellation);
        if (!found.Succeeded)
            return Refuse(found.Refusal);
        Answer = found.Value;
        return Page();
    }

    private static string? Named(string? text) => string.IsNullOrWhiteSpace(text) ? null : text;
}
