using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Protocols.Store;

/// <summary>A history must be in order: times never go back, versions count up by one, what is built upon exists.</summary>
internal static class HistoryCheck
{
    public static IReadOnlyList<DocumentError> Run(IReadOnlyList<HistoryEntry> entries)
    {
        var errors = new ErrorList();
        var newest = new Dictionary<(DocumentKind, string), int>();
        for (var i = 0; i < entries.Count; i++)
        {
            var (entry, pointer) = (entries[i], JsonPointer.Append("/entries", i));
            if (entry.StatedTime == DateTimeOffset.MinValue)
                errors.Add(pointer + "/statedTime", (string?)null, "UTC, such as 2021-03-09T14:30Z", "The calendar has no such day.");
            else if (i > 0 && entry.StatedTime < entries[i - 1].StatedTime)
                errors.Add(pointer + "/statedTime", (string?)null, "not before the entry above", "Entries stand in the order of their times.");
            if (entry.Version is null == entry.Proposal is null)
                errors.Add(pointer, (string?)null, "version or proposal", "An entry names either a version or a proposal.");
            if (entry.Version is null == (entry.Outcome == HistoryOutcome.Imported))
                errors.Add(pointer + "/outcome", $"\"{entry.Outcome}\"", "imported for a version, declined or withdrawn for a proposal", "The outcome does not go with what the entry names.");
            var before = newest.GetValueOrDefault((entry.Kind, entry.Id));
            if (entry.Version is { } version && version != before + 1)
                errors.Add(pointer + "/version", version, $"{before + 1}", "Versions of a document count up by one.");
            if (entry.BaseVersion is { } basis ? basis > before : before > 0)
                errors.Add(pointer + "/baseVersion", entry.BaseVersion?.ToString(System.Globalization.CultureInfo.InvariantCulture), $"1 to {before}", "The base version is none of the versions above.");
            newest[(entry.Kind, entry.Id)] = Math.Max(before, entry.Version ?? 0);
        }

        return errors.All;
    }
}
