using System.Text.Json.Nodes;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger;

namespace ProtoLedger.Application.History;

/// <summary>Facts about versions: what the ledger says is what the tables must say.</summary>
internal static class VersionFacts
{
    /// <summary>A new version.</summary>
    public static Fact Of(StoredVersion version, params (string Name, byte[] Bytes)[] blobs) => new(
        version.Imported ? "version-imported" : "version-approved",
        Subject(version.Key, version.Version),
        Values(version),
        [("document", version.Bytes), .. blobs]);

    /// <summary>A version that is effective from a time on.</summary>
    public static Fact Of(EffectiveRow row) => new("effective", $"{Subject(row.Key, row.Version)}@{row.Scanner}", Values(row));

    /// <summary>Name of a version.</summary>
    public static string Subject(DocumentKey key, int version) => $"{key.KindWord}/{key.Id}/{version}";

    /// <summary>Every value that the table of versions keeps.</summary>
    public static JsonObject Values(StoredVersion version) => new()
    {
        ["kind"] = version.Key.KindWord,
        ["id"] = version.Key.Id,
        ["version"] = version.Version,
        ["sha256"] = Convert.ToHexStringLower(version.Sha256),
        ["baseVersion"] = version.BaseVersion,
        ["createdAt"] = Time(version.CreatedAt),
        ["createdBy"] = version.CreatedBy,
        ["author"] = version.Author,
        ["reason"] = version.Reason,
        ["changeRequest"] = version.ChangeRequestId ?? 0,
        ["imported"] = version.Imported,
        ["statedTime"] = version.StatedTime is { } stated ? Time(stated) : "",
        ["source"] = version.Source ?? "",
        ["sourceSha256"] = version.SourceSha256 is { } hash ? Convert.ToHexStringLower(hash) : "",
    };

    /// <summary>Every value that the table of effective facts keeps.</summary>
    public static JsonObject Values(EffectiveRow row) => new()
    {
        ["kind"] = row.Key.KindWord,
        ["id"] = row.Key.Id,
        ["version"] = row.Version,
        ["scanner"] = row.Scanner,
        ["from"] = Time(row.From),
        ["recordedAt"] = Time(row.RecordedAt),
        ["recordedBy"] = row.RecordedBy,
        ["changeRequest"] = row.ChangeRequestId ?? 0,
        ["imported"] = row.Imported,
    };

    /// <summary>UTC with six digits after the second.</summary>
    public static string Time(DateTime time) => LedgerTime.Format(new DateTimeOffset(time));
}
