using System.Globalization;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Attribution;

namespace ProtoLedger.Regression.Findings;

/// <summary>Tissues, brightness, numbers and causes in the words of people who look at images.</summary>
public static class PlainWords
{
    /// <summary>A tissue as a reader of images sees it.</summary>
    /// <param name="tissue">Catalogue name.</param>
    /// <param name="bodyRegion">Region of the protocol.</param>
    /// <param name="catalogue">Holds its title.</param>
    public static string Tissue(string tissue, string bodyRegion, CatalogueDocument catalogue)
    {
        ArgumentNullException.ThrowIfNull(catalogue);
        return (tissue, bodyRegion) switch
        {
            ("csf", "brain" or "pituitary" or "head") => "ventricles and sulci",
            ("synovial-fluid", _) => "joint fluid",
            ("grey-matter", _) => "grey matter",
            ("lesion", _) => "lesions",
            ("fat", _) => "fat",
            _ => catalogue.Tissues.FirstOrDefault(t => t.Name == tissue)?.Title is { } title ? Lower(title) : tissue,
        };
    }

    /// <summary>Brightness against a reference tissue.</summary>
    /// <param name="ratio">Signal over that of the reference, ≥ 0.</param>
    /// <param name="reference">The reference in words.</param>
    /// <remarks>Bounds are those at which a reader would change the word on a display windowed for the reference; common practice, no source.</remarks>
    public static string Brightness(double ratio, string reference) => ratio switch
    {
        < 0.12 => "black",
        < 0.30 => "very dark",
        < 0.55 => "dark grey",
        < 0.85 => $"darker than {reference}",
        <= 1.18 => $"about as bright as {reference}",
        <= 1.7 => $"brighter than {reference}",
        _ => $"much brighter than {reference}",
    };

    /// <summary>A ratio with two significant digits, two decimals below 1.</summary>
    /// <param name="value">The ratio.</param>
    public static string Ratio(double value) => Math.Abs(value) switch
    {
        < 0.995 => value.ToString("0.00", CultureInfo.InvariantCulture),
        < 9.95 => value.ToString("0.0", CultureInfo.InvariantCulture),
        _ => value.ToString("0", CultureInfo.InvariantCulture),
    };

    /// <summary>A number of the document as it is entered.</summary>
    /// <param name="value">JSON value, or null.</param>
    public static string Setting(JsonNode? value) => value switch
    {
        null => "none",
        JsonValue plain => plain.ToString(),
        JsonArray items when items.Count > 6 => $"{items.Count} values",
        JsonArray items => string.Join(", ", items.Select(Setting)),
        _ => "a block",
    };

    /// <summary>A cause: parameters with old and new value, such as "RepetitionTime 9000 to 6000 ms".</summary>
    /// <param name="share">One share of an attribution.</param>
    public static string Cause(AttributionShare share)
    {
        ArgumentNullException.ThrowIfNull(share);
        return string.Join(" with ", share.Changes.Select(c => Change(c.Change)));
    }

    /// <summary>One changed parameter with old and new value.</summary>
    /// <param name="change">The change.</param>
    public static string Change(ParameterChange change)
    {
        ArgumentNullException.ThrowIfNull(change);
        var unit = change.Unit is { Length: > 0 } u ? $" {u}" : "";
        // A bare "mean" says nothing: values of tissues and conditions are called by their label.
        var name = change.Name.Length > 0 && (char.IsUpper(change.Name[0]) || change.SeriesId is not null) && !int.TryParse(change.Name, out _) ? change.Name : change.Label;
        return change.Kind switch
        {
            ChangeKind.Added => change.New is JsonValue ? $"{name} {Setting(change.New)}{unit} added" : $"{change.Label} added",
            ChangeKind.Removed => change.Old is JsonValue ? $"{name} {Setting(change.Old)}{unit} removed" : $"{change.Label} removed",
            ChangeKind.Reordered => $"{change.Label} reordered",
            _ => $"{name} {Setting(change.Old)} to {Setting(change.New)}{unit}",
        };
    }

    /// <summary>Causes of a change: those with at least a fifth of the largest, and what works against them.</summary>
    /// <param name="shares">Largest absolute share first.</param>
    /// <param name="total">The change that they add up to.</param>
    public static string Causes(IReadOnlyList<AttributionShare> shares, double total)
    {
        ArgumentNullException.ThrowIfNull(shares);
        if (shares.Count == 0)
            return "";
        var counted = shares.Where(s => Math.Abs(s.Share) >= 0.2 * Math.Abs(shares[0].Share) && s.Share != 0).Take(4).ToArray();
        // Where shares cancel, what drives is the side of the larger share.
        var sign = Math.Sign(Math.Abs(total) > 0.05 * Math.Abs(shares[0].Share) ? total : shares[0].Share);
        var (driving, against) = (counted.Where(s => Math.Sign(s.Share) == sign).ToArray(), counted.Where(s => Math.Sign(s.Share) != sign).ToArray());
        if (driving.Length == 0)
            return "";
        var text = $"{(driving.Length == 1 ? "cause" : "causes")}: {string.Join(" and ", driving.Select(Cause))}";
        return against.Length == 0 ? text : $"{text}, countered by {string.Join(" and ", against.Select(Cause))}";
    }

    /// <summary>"worse for more than 99 % of plausible tissue values".</summary>
    /// <param name="word">better, worse, brighter, …</param>
    /// <param name="share">In [0, 1].</param>
    public static string ForShare(string word, double share) => share switch
    {
        >= 0.99 => $"{word} for more than 99 % of plausible tissue values",
        < 0.01 => $"{word} for less than 1 % of plausible tissue values",
        _ => string.Create(CultureInfo.InvariantCulture, $"{word} for about {Math.Round(share * 100)} % of plausible tissue values"),
    };

    /// <summary>Seconds as minutes and seconds, "3:06 min".</summary>
    /// <param name="seconds">s, ≥ 0.</param>
    public static string Minutes(double seconds)
    {
        var whole = (long)Math.Round(seconds);
        return string.Create(CultureInfo.InvariantCulture, $"{whole / 60}:{whole % 60:00} min");
    }

    private static string Lower(string title) =>
        title.Length > 1 && char.IsUpper(title[0]) && char.IsLower(title[1]) ? char.ToLowerInvariant(title[0]) + title[1..] : title;
}
