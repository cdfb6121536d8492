using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>One value to put into a document.</summary>
/// <param name="Pointer">JSON pointer; a last token <c>-</c> adds to the end of a list.</param>
/// <param name="Value">New value, or null to remove what stands there.</param>
public sealed record ParameterSetting(string Pointer, JsonNode? Value);

/// <summary>Puts values into a stored document and reads the outcome as any other document.</summary>
public static class ParameterEdit
{
    /// <summary>The document with the values put in, or what is wrong with it then.</summary>
    /// <param name="canonical">Canonical bytes of a document that was read before.</param>
    /// <param name="settings">Values, applied in order.</param>
    public static ParseResult Apply(ReadOnlySpan<byte> canonical, params IEnumerable<ParameterSetting> settings)
    {
        var tree = StrictJson.Parse(canonical);
        var errors = settings.Select(setting => Set(tree, setting)).OfType<DocumentError>().ToArray();
        return errors.Length > 0 ? new ParseResult.Refused(errors) : DocumentReader.ReadTree(tree);
    }

    private static DocumentError? Set(JsonNode? tree, ParameterSetting setting)
    {
        var (pointer, value) = (setting.Pointer, setting.Value?.DeepClone());
        var cut = pointer.LastIndexOf('/');
        if (cut < 0 || !JsonPointer.TryFind(tree, pointer[..cut], out var parent))
            return Missing(pointer);
        var token = JsonPointer.Tokens(pointer)[^1];
        switch (parent)
        {
            case JsonObject members when value is null:
                return members.Remove(token) ? null : Missing(pointer);
            case JsonObject members:
                members[token] = value;
                return null;
            case JsonArray items when token == "-" && value is not null:
                items.Add(value);
                return null;
            case JsonArray items when JsonPointer.TryIndex(token, items.Count, out var index):
                if (value is null)
                    items.RemoveAt(index);
                else
                    items[index] = value;
                return null;
            default:
                return Missing(pointer);
        }
    }

    private static DocumentError Missing(string pointer) =>
        new(pointer, null, "a place of the document", "There is nothing in the document at this pointer.");
}
