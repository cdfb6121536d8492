using System.Text.RegularExpressions;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;
using static ProtoLedger.Protocols.Formats.V1.Shapes.Make;

namespace ProtoLedger.Protocols.Store;

/// <summary>Shapes of the two lists of a protocol store.</summary>
internal static partial class StoreShapes
{
    public const string TimeFormat = "yyyy-MM-dd'T'HH:mm'Z'";

    public static ObjectShape History { get; } = Block(
        "history",
        Required("format", Whole(1, 1), "format"),
        Required(
            "entries",
            List(
                Block(
                    "entry",
                    Required("kind", OneOf([.. DocumentKinds.Words]), "kind"),
                    Required("id", Identifier, "identifier"),
                    Optional("version", Whole(1, 9999), "version"),
                    Optional("proposal", Identifier, "proposal"),
                    Optional("baseVersion", Whole(1, 9999), "base version"),
                    Required("statedTime", new TextShape(17, TimePattern(), "UTC, such as 2021-03-09T14:30Z"), "stated time"),
                    Required("statedBy", Account, "stated author"),
                    Required("reason", Prose, "reason"),
                    Required("source", Prose, "source"),
                    Required("outcome", OneOf("imported", "declined", "withdrawn"), "outcome"),
                    Optional("decidedBy", Account, "decided by"),
                    Optional("decisionReason", Prose, "reason of the decision")),
                1,
                10000),
            "entries"));

    public static ObjectShape People { get; } = Block(
        "people",
        Required("format", Whole(1, 1), "format"),
        Required(
            "people",
            List(
                Line("person", Required("name", Account, "account name"), Required("displayName", Title, "name"), Required("role", OneOf(DocumentShapes.Roles), "role")),
                1,
                1000,
                "name"),
            "people"));

    [GeneratedRegex(@"^\d{4}-(0[1-9]|1[0-2])-(0[1-9]|[12]\d|3[01])T([01]\d|2[0-3]):[0-5]\dZ$")]
    private static partial Regex TimePattern();
}
