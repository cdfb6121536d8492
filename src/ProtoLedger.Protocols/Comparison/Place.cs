using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>Where a walk stands in both documents, and how people call that place.</summary>
internal sealed record Place(string OldPointer, string NewPointer, string Name, string Label, string? Keyword, string Item, string? SeriesId, string? SeriesTitle, bool IsItem = false)
{
    public static Place Root { get; } = new("", "", "", "document", null, "", null, null);

    public string FullLabel => Item.Length == 0 || Item == Label ? Label : Item.EndsWith(" " + Label, StringComparison.Ordinal) ? Item : $"{Label}, {Item}";

    public Place Into(Member member) => this with
    {
        OldPointer = JsonPointer.Append(OldPointer, member.Name),
        NewPointer = JsonPointer.Append(NewPointer, member.Name),
        Name = member.Name,
        Label = !IsItem && member.Name is ("mean" or "sd" or "source" or "evidence")
            ? $"{Label}, {member.Label}"
            : member.Label,
        Keyword = member.Keyword,
        IsItem = false,
    };

    public Place IntoKey(string key) => this with
    {
        OldPointer = JsonPointer.Append(OldPointer, key),
        NewPointer = JsonPointer.Append(NewPointer, key),
        Name = key,
        Item = Join(key),
        IsItem = true,
    };

    /// <param name="oldIndex">Position in the old list, or −1.</param>
    /// <param name="newIndex">Position in the new list, or −1.</param>
    /// <param name="item">The item.</param>
    /// <param name="ordinal">Number among items of equal identity, from 1; null where there is one alone.</param>
    public Place IntoItem(int oldIndex, int newIndex, JsonNode item, int? ordinal)
    {
        var members = item as JsonObject;
        var place = this with
        {
            IsItem = true,
            OldPointer = oldIndex < 0 ? OldPointer : JsonPointer.Append(OldPointer, oldIndex),
            NewPointer = newIndex < 0 ? NewPointer : JsonPointer.Append(NewPointer, newIndex),
        };
        return Name switch
        {
            "series" when members is not null => place with { SeriesId = Text(members, "id"), SeriesTitle = Text(members, "title") },
            "preparations" => place with { Label = Words(item), Item = ordinal is { } number ? $"{Ordinal(number)} {Words(item)}" : "" },
            "fields" => place with { Item = Join($"at {ShownValue.Of(StrictJson.ToDouble(members!["fieldStrength"]!.AsValue()))} T") },
            _ => place with
            {
                Item = Join(members is null
                    ? ShapeCheck.KindOf(item) ?? item.ToJsonString()
                    : Text(members, "title") ?? Text(members, "parameter") ?? Text(members, "role") ?? Text(members, "name") ?? ""),
            },
        };
    }

    private static string Words(JsonNode preparation) => Text(preparation.AsObject(), "kind") switch
    {
        "t2Preparation" => "T2 preparation",
        "spectralSaturation" => "fat saturation",
        "spectralInversion" => "fat inversion",
        var kind => kind ?? "preparation",
    };

    private static string Ordinal(int number) => number switch { 1 => "first", 2 => "second", 3 => "third", _ => $"{number}th" };

    private string Join(string item) => Item.Length == 0 ? item : $"{Item} {item}";

    private static string? Text(JsonObject members, string name) => ShapeCheck.KindOf(members[name]);
}
