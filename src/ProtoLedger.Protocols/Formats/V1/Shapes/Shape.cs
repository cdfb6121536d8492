using System.Text.RegularExpressions;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>
/// What may stand at one place of a document of format 1. One description serves the check, the typing of YAML scalars,
/// the order of the canonical export, the editors' JSON Schema and the catalogue of parameters, so that they cannot drift apart.
/// </summary>
internal abstract record Shape;

/// <summary>A number in a range.</summary>
/// <param name="Low">Lowest value, excluded when <paramref name="LowOpen"/>.</param>
/// <param name="High">Highest value, included.</param>
/// <param name="Unit">As written in reports; empty for none.</param>
/// <param name="LowOpen">True when the lowest value itself is not allowed.</param>
/// <param name="Whole">True for whole numbers.</param>
internal sealed record NumberShape(double Low, double High, string Unit, bool LowOpen = false, bool Whole = false) : Shape
{
    public bool Contains(double value) =>
        (LowOpen ? value > Low : value >= Low) && value <= High && (!Whole || value == Math.Floor(value));

    public string Limit
    {
        get
        {
            var unit = Unit.Length == 0 ? "" : " " + Unit;
            var whole = Whole ? "whole number, " : "";
            return FormattableString.Invariant($"{whole}{Low} {(LowOpen ? "<" : "≤")} value ≤ {High}{unit}");
        }
    }
}

/// <summary>A text.</summary>
/// <param name="MaximumLength">In UTF-16 units.</param>
/// <param name="Pattern">What it must match, or null.</param>
/// <param name="PatternInWords">The pattern in words.</param>
internal sealed record TextShape(int MaximumLength, Regex? Pattern = null, string? PatternInWords = null) : Shape;

/// <summary>One of a list of words.</summary>
/// <param name="Words">All of them.</param>
internal sealed record ChoiceShape(IReadOnlyList<string> Words) : Shape;

/// <summary>True or false.</summary>
internal sealed record FlagShape : Shape;

/// <summary>A list.</summary>
/// <param name="Item">What each item is.</param>
/// <param name="Minimum">Fewest items.</param>
/// <param name="Maximum">Most items.</param>
/// <param name="Identity">Keys that tell items apart and follow them through versions; one empty key when the item's own value does, no key when the position does.</param>
/// <param name="Distinct">False when items of the same identity may repeat and are told apart by their order.</param>
internal sealed record ListShape(Shape Item, int Minimum, int Maximum, IReadOnlyList<string> Identity, bool Distinct = true) : Shape;

/// <summary>An object with free keys.</summary>
/// <param name="Key">What each key must be.</param>
/// <param name="Value">What each value is.</param>
/// <param name="Maximum">Most members.</param>
internal sealed record MapShape(TextShape Key, Shape Value, int Maximum) : Shape;

/// <summary>An object with an exact set of keys.</summary>
/// <param name="Name">What it is called in messages.</param>
/// <param name="Members">In the order of the export.</param>
/// <param name="Flow">True to write it on one line.</param>
internal sealed record ObjectShape(string Name, IReadOnlyList<Member> Members, bool Flow = false) : Shape
{
    public Member? Find(string name) => Members.FirstOrDefault(member => member.Name == name);
}

/// <summary>An object whose member <c>kind</c> says which of several key sets applies.</summary>
/// <param name="Name">What it is called in messages.</param>
/// <param name="Options">Kind → shape; each shape's first member is <c>kind</c>.</param>
internal sealed record VariantShape(string Name, IReadOnlyList<(string Kind, ObjectShape Shape)> Options) : Shape
{
    public ObjectShape? Find(string? kind) => Options.FirstOrDefault(option => option.Kind == kind).Shape;
}

/// <summary>A name, or an object in its place.</summary>
/// <param name="Text">The name.</param>
/// <param name="Object">The object.</param>
internal sealed record NameOrObjectShape(TextShape Text, VariantShape Object) : Shape;

/// <summary>One key of an object.</summary>
/// <param name="Name">As in the document.</param>
/// <param name="Shape">What its value is.</param>
/// <param name="Required">False when it may be left out.</param>
/// <param name="Label">In trade words, for reports.</param>
/// <param name="Keyword">DICOM keyword, or null where none exists.</param>
/// <param name="Tag">DICOM tag, such as (0018,0080), or null.</param>
internal sealed record Member(string Name, Shape Shape, bool Required, string Label, string? Keyword = null, string? Tag = null);
