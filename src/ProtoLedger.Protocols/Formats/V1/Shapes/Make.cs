using System.Text.RegularExpressions;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>Short words in which the shapes of format 1 are written.</summary>
internal static partial class Make
{
    public static TextShape Identifier { get; } = new(64, IdentifierPattern(), "lower-case words and digits joined by hyphens");

    public static TextShape Account { get; } = new(64, AccountPattern(), "an account name such as t.okafor");

    public static TextShape PulseName { get; } = new(64, PulseNamePattern(), "letters, digits and hyphens, a letter first");

    public static TextShape Title { get; } = new(160);

    public static TextShape Prose { get; } = new(8000);

    public static Member Required(string name, Shape shape, string label, string? keyword = null, string? tag = null) =>
        new(name, shape, true, label, keyword, tag);

    public static Member Optional(string name, Shape shape, string label, string? keyword = null, string? tag = null) =>
        new(name, shape, false, label, keyword, tag);

    public static NumberShape From(double low, double high, string unit = "") => new(low, high, unit);

    public static NumberShape Above(double low, double high, string unit = "") => new(low, high, unit, LowOpen: true);

    public static NumberShape Whole(int low, int high) => new(low, high, "", Whole: true);

    public static ChoiceShape OneOf(params string[] words) => new(words);

    public static ListShape List(Shape item, int minimum, int maximum, params string[] identity) =>
        new(item, minimum, maximum, identity);

    public static ObjectShape Block(string name, params Member[] members) => new(name, members);

    public static ObjectShape Line(string name, params Member[] members) => new(name, members, Flow: true);

    public static VariantShape Variants(string name, params (string Kind, Member[] Members)[] options) =>
        new(name, [.. options.Select(option => (option.Kind, Line(
            option.Kind, [Required("kind", OneOf(option.Kind), "kind"), .. option.Members])))]);

    [GeneratedRegex("^[a-z0-9]+(-[a-z0-9]+)*$")]
    private static partial Regex IdentifierPattern();

    [GeneratedRegex("^[a-z0-9]+([.-][a-z0-9]+)*$")]
    private static partial Regex AccountPattern();

    [GeneratedRegex("^[A-Za-z][A-Za-z0-9-]*$")]
    private static partial Regex PulseNamePattern();
}
