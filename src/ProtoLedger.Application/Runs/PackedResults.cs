using System.Runtime.InteropServices;
using System.Security.Cryptography;
using System.Text.Json;
using ProtoLedger.Application.Stores;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Application.Runs;

/// <summary>Packs results into rows and back. The lists of observables and expectations are blobs that many rows share.</summary>
internal sealed class PackedResults(IStores stores, CancellationToken cancellationToken)
{
    private readonly Dictionary<string, ObservableList> lists = new(StringComparer.Ordinal);

    /// <summary>The row of a result.</summary>
    public static (ResultRow Row, byte[] List) Pack(long run, RunSubject subject, string scanner, EvaluationResult result)
    {
        var packed = PackedPrediction.Of(result);
        var list = JsonSerializer.SerializeToUtf8Bytes(
            new ObservableList([.. packed.Observables.Select(key => key.ToString())], packed.Expectations));
        var row = new ResultRow(
            run, subject.Protocol, subject.Version, subject.ChangeRequest, scanner,
            Convert.FromHexString(subject.Sha256), Convert.FromHexString(result.InputHash), SHA256.HashData(list),
            packed.Nominal, packed.Low, packed.High,
            [.. packed.Verdicts.Select(verdict => verdict.Probability)],
            [.. packed.Verdicts.Select(verdict => (short)verdict.Verdict)],
            [.. packed.Verdicts.Select(verdict => (short)verdict.NominalVerdict)],
            []);
        return (row with { PackedSha256 = Hash(row) }, list);
    }

    /// <summary>True when the row's numbers are those that were computed.</summary>
    public static bool IsIntact(ResultRow row) => Hash(row).AsSpan().SequenceEqual(row.PackedSha256);

    /// <summary>The prediction of a row; null where arrays and list do not fit, so that the row was altered.</summary>
    public async Task<PackedPrediction?> UnpackAsync(ResultRow row)
    {
        var list = await ListAsync(row.ObservablesSha256);
        if (list is null || row.Nominal.Length != list.Observables.Count || row.Low.Length != row.Nominal.Length || row.High.Length != row.Nominal.Length
            || row.Verdict.Length != list.Expectations.Count || row.NominalVerdict.Length != row.Verdict.Length || row.Probability.Length != row.Verdict.Length)
            return null;
        return new PackedPrediction(
            list.Keys, row.Nominal, row.Low, row.High, list.Expectations,
            [.. row.Verdict.Select((verdict, i) => new VerdictRecord((Verdict)verdict, (Verdict)row.NominalVerdict[i], row.Probability[i]))]);
    }

    private static byte[] Hash(ResultRow row)
    {
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        foreach (var values in new[] { row.Nominal, row.Low, row.High, row.Probability })
            hash.AppendData(MemoryMarshal.AsBytes(values.AsSpan()));
        hash.AppendData(MemoryMarshal.AsBytes(row.Verdict.AsSpan()));
        hash.AppendData(MemoryMarshal.AsBytes(row.NominalVerdict.AsSpan()));
        return hash.GetHashAndReset();
    }

    private async Task<ObservableList?> ListAsync(byte[] sha256)
    {
        var hex = Convert.ToHexStringLower(sha256);
        if (lists.TryGetValue(hex, out var known))
            return known;
        if (await stores.Ledger.FindBlobAsync(sha256, cancellationToken) is not { } bytes)
            return null;
        return lists[hex] = JsonSerializer.Deserialize<ObservableList>(bytes)!;
    }

    private sealed record ObservableList(IReadOnlyList<string> Observables, IReadOnlyList<string> Expectations)
    {
        private IReadOnlyList<ObservableKey>? keys;

        [System.Text.Json.Serialization.JsonIgnore]
        public IReadOnlyList<ObservableKey> Keys => keys ??= [.. Observables.Select(ObservableKey.Parse)];
    }
}
