using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>Where a walk stands in both documents, and how people call that place.</summary>
internal sealed record Place(string OldPointer, string NewPointer, string Name, string Label, string? Keyword, string Item, string? SeriesId, string? SeriesTitle)
{
    public static Place Root { get; } = new("", "", "", "document", null, "", null, null);

    public string FullLabel => Item.Length == 0 || Item == Label ? Label : $"{Label}, {Item}";

    public Place Into(Member member) => this with
    {
        OldPointer = JsonPointer.Append(OldPointer, member.Name),
        NewPointer = JsonPointer.Append(NewPointer, member.Name),
        Name = member.Name,
        Label = member.Name is "mean" or "sd" or "source" or "evidence" or "low" or "high" or "word" or "meaning" && Label != "document"
            ? $"{Label}, {member.Label}"
            : member.Label,
        Keyword = member.Keyword,
    };

    public Place IntoKey(string key) => this with
    {
        OldPointer = JsonPointer.Append(OldPointer, key),
        NewPointer = JsonPointer.Append(NewPointer, key),
        Name = key,
        Item = Join(key),
    };

    public Place IntoItem(int oldIndex, int newIndex, JsonNode item)
    {
        var members = item as JsonObject;
        var place = this with
        {
            OldPointer = oldIndex < 0 ? OldPointer : JsonPointer.Append(OldPointer, oldIndex),
            NewPointer = newIndex < 0 ? NewPointer : JsonPointer.Append(NewPointer, newIndex),
        };
        return Name switch
        {
            "series" when members is not null => place with { SeriesId = Text(members, "id"), SeriesTitle = Text(members, "title") },
            "preparations" => place with { Label = Text(members!, "kind")!, Item = "" },
            "fields" => place with { Item = Join($"at {ShownValue.Of(StrictJson.ToDouble(members!["fieldStrength"]!.AsValue()))} T") },
            _ => place with
            {
                Item = Join(members is null
                    ? ShapeCheck.KindOf(item) ?? item.ToJsonString()
                    : Text(members, "title") ?? Text(members, "parameter") ?? Text(members, "role") ?? Text(members, "name") ?? ""),
            },
        };
    }

    private string Join(string item) => Item.Length == 0 ? item : $"{Item} {item}";

    private static string? Text(JsonObject members, string name) => ShapeCheck.KindOf(members[name]);
}
