using ProtoLedger.Protocols.Canonical;
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
                && tissues.Contains(TissueAt(edit, changed, index)),
            _ => false,
        };
    }

    private static string TissueAt(EditedInput edit, ChangedParameter changed, string index)
    {
        // The pointer of what was removed stands in the old document, every other one in the new.
        var input = changed.Change.Kind == Protocols.Comparison.ChangeKind.Removed ? edit.Before : edit.After;
        var rows = input.Catalogue.Document.Tissues;
        return int.TryParse(index, out var i) && i < rows.Count ? rows[i].Name : "";
    }
}
