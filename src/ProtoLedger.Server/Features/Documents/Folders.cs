using ProtoLedger.Application.Documents;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>The first part of the address of each kind, the same in pages and in the API.</summary>
internal static class Folders
{
    public static IReadOnlyList<(string Name, DocumentKind Kind)> All { get; } =
    [
        ("protocols", DocumentKind.Protocol), ("scanners", DocumentKind.Scanner), ("conditions", DocumentKind.Conditions),
        ("catalogues", DocumentKind.Catalogue), ("expectations", DocumentKind.Expectations),
    ];

    /// <summary>What a route takes in place of the folder.</summary>
    public const string Pattern = "protocols|scanners|conditions|catalogues|expectations";

    public static string Of(DocumentKind kind) => All.Single(folder => folder.Kind == kind).Name;

    public static DocumentKey Key(string folder, string id) => new(All.Single(known => known.Name == folder).Kind, id);
}
