using System.Text;
using System.Text.Json.Nodes;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Audit;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.History;

/// <summary>Compares the tables with what the leaves and their contents say.</summary>
internal static class RecordComparison
{
    private static readonly string[] Kept =
        ["version-imported", "version-approved", "effective", SignatureFacts.Type, "certificate-issued", "certificate-revoked", LoadedFacts.Type];

    /// <summary>Every record that differs, in the order of the ledger, and how many were compared.</summary>
    public static async Task<(IReadOnlyList<AuditFault> Faults, int Compared)> RunAsync(
        IStores stores, IReadOnlyList<(long Sequence, LedgerLeaf Leaf)> leaves, Dictionary<Digest, byte[]> contents, CancellationToken cancellationToken)
    {
        var faults = new List<AuditFault>();
        var stored = await StoredAsync(stores, cancellationToken);
        var compared = stored.Values.Sum(records => records.Values.Sum());
        foreach (var (sequence, leaf) in leaves.Where(pair => Kept.Contains(pair.Leaf.Type)))
        {
            var kind = leaf.Type.StartsWith("version-", StringComparison.Ordinal) ? "version" : leaf.Type;
            var said = Fact(leaf, contents);
            if (said is null || !Take(stored[kind], said))
                faults.Add(new AuditFault($"{Name(kind)} of leaf {sequence}", $"the ledger says {said ?? "what is missing among the contents"}; the table has no such record"));
        }

        foreach (var (kind, records) in stored)
            faults.AddRange(records.Where(record => record.Value > 0).Select(record => new AuditFault(
                Name(kind), $"the table holds {record.Key}; no leaf says so")));
        var requests = await RequestsAsync(stores, leaves, contents, cancellationToken);
        return ([.. faults, .. requests.Faults], compared + requests.Compared);
    }

    private static string Name(string kind) => kind switch
    {
        "version" => "document version",
        "effective" => "effective fact",
        _ => kind,
    };

    private static string? Fact(LedgerLeaf leaf, Dictionary<Digest, byte[]> contents) =>
        leaf.Blobs.TryGetValue("fact", out var hash) && contents.TryGetValue(hash, out var bytes) ? Encoding.UTF8.GetString(bytes) : null;

    private static bool Take(Dictionary<string, int> records, string fact)
    {
        if (!records.TryGetValue(fact, out var count) || count == 0)
            return false;
        records[fact] = count - 1;
        return true;
    }

    private static async Task<Dictionary<string, Dictionary<string, int>>> StoredAsync(IStores stores, CancellationToken cancellationToken)
    {
        var versions = new List<JsonObject>();
        foreach (var kind in Enum.GetValues<DocumentKind>())
            versions.AddRange((await stores.Documents.AllAsync(kind, cancellationToken)).Select(VersionFacts.Values));
        return new Dictionary<string, Dictionary<string, int>>(StringComparer.Ordinal)
        {
            ["version"] = Count(versions),
            ["effective"] = Count((await stores.Records.EffectiveAsync(cancellationToken)).Select(VersionFacts.Values)),
            [SignatureFacts.Type] = Count((await stores.Records.SignaturesAsync(cancellationToken)).Select(SignatureFacts.Values)),
            ["certificate-issued"] = Count((await stores.Records.CertificatesAsync(cancellationToken)).Select(EnrolSigner.Values)),
            ["certificate-revoked"] = Count((await stores.Keys.RevocationsAsync(cancellationToken)).Select(RevokeCertificate.Values)),
            [LoadedFacts.Type] = Count((await stores.Records.LoadedAsync(cancellationToken)).Select(LoadedFacts.Values)),
        };
    }

    private static Dictionary<string, int> Count(IEnumerable<JsonObject> records) =>
        records.Select(Text).GroupBy(text => text, StringComparer.Ordinal).ToDictionary(group => group.Key, group => group.Count(), StringComparer.Ordinal);

    private static string Text(JsonObject values) => Encoding.UTF8.GetString(CanonicalJson.Serialize(values));

    /// <summary>A request is what its newest fact says; one without a fact is a draft.</summary>
    private static async Task<(IReadOnlyList<AuditFault> Faults, int Compared)> RequestsAsync(
        IStores stores, IReadOnlyList<(long Sequence, LedgerLeaf Leaf)> leaves, Dictionary<Digest, byte[]> contents, CancellationToken cancellationToken)
    {
        var newest = new Dictionary<string, (long Sequence, string? Fact)>(StringComparer.Ordinal);
        foreach (var (sequence, leaf) in leaves.Where(pair => pair.Leaf.Type.StartsWith("change-request-", StringComparison.Ordinal) || pair.Leaf.Type == "proposal-imported"))
            newest[leaf.Subject] = (sequence, Fact(leaf, contents));
        var faults = new List<AuditFault>();
        var rows = await stores.Records.ChangeRequestsAsync(cancellationToken);
        foreach (var row in rows)
        {
            if (!newest.Remove(Proposals.Subject(row.Id), out var said))
            {
                if (row.State != ChangeRequestState.Draft)
                    faults.Add(new AuditFault($"change request {row.Id}", $"it is \"{row.State.ToWord()}\" in the table; no leaf speaks of it"));
            }
            else if (Text(Proposals.Values(row)) is var stored && stored != said.Fact)
            {
                faults.Add(new AuditFault($"change request {row.Id}", $"leaf {said.Sequence} says {said.Fact}; the table holds {stored}"));
            }
        }

        faults.AddRange(newest.Select(missing => new AuditFault(missing.Key, $"leaf {missing.Value.Sequence} speaks of it; the table lacks it")));
        return (faults, rows.Count);
    }
}
