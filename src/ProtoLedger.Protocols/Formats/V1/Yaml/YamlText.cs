using System.Buffers;
using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;

namespace ProtoLedger.Protocols.Formats.V1.Yaml;

/// <summary>Texts as YAML scalars: plain where every reader would see a text, otherwise in double quotes.</summary>
internal static partial class YamlText
{
    private static readonly SearchValues<char> FlowMarks = SearchValues.Create(",[]{}:");

    public static string Key(string name) => Value(name, inFlow: true);

    public static string Value(string value, bool inFlow) => IsPlain(value, inFlow) ? value : Quote(value);

    private static bool IsPlain(string value, bool inFlow) =>
        Plain().IsMatch(value)
        && !Resolved().IsMatch(value)
        && !value.Contains(": ", StringComparison.Ordinal)
        && !value.Contains(" #", StringComparison.Ordinal)
        && !value.EndsWith(':')
        && (!inFlow || !value.AsSpan().ContainsAny(FlowMarks));

    private static string Quote(string value)
    {
        var text = new StringBuilder("\"");
        foreach (var character in value)
            _ = character switch
            {
                '"' => text.Append("\\\""),
                '\\' => text.Append("\\\\"),
                '\n' => text.Append("\\n"),
                '\t' => text.Append("\\t"),
                // Line and paragraph separators, byte order mark, controls and no-break space are escaped so that no reader folds or drops them.
                '\u0085' or '\u2028' or '\u2029' or '\uFEFF' or '\u00A0' or < ' ' or (>= '\u007F' and < '\u00A0') =>
                    text.Append("\\u").Append(((int)character).ToString("X4", CultureInfo.InvariantCulture)),
                _ => text.Append(character),
            };
        return text.Append('"').ToString();
    }

    /// <summary>A letter or slash first, then printable characters without a space at the end.</summary>
    [GeneratedRegex(@"^[\p{L}/]([\p{L}\p{N}\p{P}\p{S} ]*[\p{L}\p{N}\p{P}\p{S}])?\z")]
    private static partial Regex Plain();

    /// <summary>Words that YAML readers without a schema take for something other than a text.</summary>
    [GeneratedRegex(@"^(true|false|yes|no|on|off|y|n|null)\z", RegexOptions.IgnoreCase)]
    private static partial Regex Resolved();
}
