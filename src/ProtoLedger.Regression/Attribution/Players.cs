using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Attribution;

/// <summary>Which changes can move the numbers of a series at all.</summary>
internal static class Players
{
    private static readonly HashSet<string> Played = ["preparations", "readout", "timing", "geometry", "contrastConcentration"];

    /// <summary>Positions in the edit's changes: what is played in this series, and what every series depends on.</summary>
    internal static int[] Of(EditedInput edit, string series, IReadOnlySet<string> tissues) =>
        [.. Enumerable.Range(0, edit.Changes.Count).Where(i => Counts(edit, edit.Changes[i], series, tissues))];

    /// <summary>Changes of the series' allowed ranges: they move no number, but a set value may be valid within its own range alone.</summary>
    internal static int[] Companions(EditedInput edit, string series) =>
        [.. Enumerable.Range(0, edit.Changes.Count).Where(i => IsCompanion(edit.Changes[i]) && edit.Changes[i].Change.SeriesId == series)];

    internal static bool IsCompanion(ChangedParameter changed) =>
        changed.Document == DocumentKind.Protocol && changed.Change.SeriesId is not null && JsonPointer.Tokens(changed.Change.Pointer) is [_, _, "allowedRanges", ..];

    private static bool Counts(EditedInput edit, ChangedParameter changed, string series, IReadOnlySet<string> tissues)
    {
        var tokens = JsonPointer.Tokens(changed.Change.Pointer);
        return changed.Document switch
        {
            DocumentKind.Protocol when changed.Change.SeriesId is { } own => own == series && (tokens.Count <= 2 || Played.Contains(tokens[2])),
            DocumentKind.Protocol => tokens is ["bodyRegion" or "ageGroup"],
            DocumentKind.Scanner => tokens is ["MagneticFieldStrength"] or ["pulses", ..],
            DocumentKind.Conditions => tokens is ["conditions", ..] && tokens[^1] is not "title",
            DocumentKind.Catalogue => tokens is ["tissues", var index, ..]
                && !(tokens[^1] is "title" or "source" or "evidence")
                && IsUsed(edit, changed, tokens, index, tissues),
            _ => false,
        };
    }

    /// <summary>A value of a tissue that the series shows, at the scanner's field where it belongs to one.</summary>
    private static bool IsUsed(EditedInput edit, ChangedParameter changed, IReadOnlyList<string> tokens, string index, IReadOnlySet<string> tissues)
    {
        // The pointer of what was removed stands in the old document, every other one in the new.
        var input = changed.Change.Kind == ChangeKind.Removed ? edit.Before : edit.After;
        var rows = input.Catalogue.Document.Tissues;
        if (!int.TryParse(index, out var i) || i >= rows.Count || !tissues.Contains(rows[i].Name))
            return false;
        return tokens is not [_, _, "fields", var number, ..] || !int.TryParse(number, out var k) || k >= rows[i].Fields.Count
            || Math.Abs(rows[i].Fields[k].FieldStrength - input.Scanner.Document.MagneticFieldStrength) <= CatalogueMapping.FieldTolerance;
    }
}
