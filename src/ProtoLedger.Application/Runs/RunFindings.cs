using System.Text.Json;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Application.Runs;

/// <summary>What a run found, kept as canonical JSON.</summary>
/// <param name="ComparedWith">Run with whose stored numbers it was compared, or null for the first.</param>
/// <param name="Moved">Versions whose prediction moved though their document did not, one entry a scanner.</param>
/// <param name="NewlyFailing">Expectations that newly fail.</param>
/// <param name="NewlyHolding">Expectations that newly hold.</param>
/// <param name="Altered">Stored results of the run before that are not what was computed then; this run holds the right numbers.</param>
public sealed record RunFindings(
    long? ComparedWith,
    IReadOnlyList<MovedVersion> Moved,
    IReadOnlyList<ChangedVerdict> NewlyFailing,
    IReadOnlyList<ChangedVerdict> NewlyHolding,
    IReadOnlyList<ResultName> Altered)
{
    private static readonly JsonSerializerOptions Json = new(JsonSerializerDefaults.Web);

    /// <summary>Canonical bytes.</summary>
    internal byte[] ToBytes() => CanonicalJson.Serialize(System.Text.Json.Nodes.JsonNode.Parse(JsonSerializer.SerializeToUtf8Bytes(this, Json)));

    /// <summary>Reads canonical bytes.</summary>
    internal static RunFindings Parse(byte[] bytes) => JsonSerializer.Deserialize<RunFindings>(bytes, Json)!;
}

/// <summary>Names a result.</summary>
/// <param name="Protocol">Protocol.</param>
/// <param name="Version">Stored version; 0 for a proposal.</param>
/// <param name="ChangeRequestId">Request of a proposal; 0 for a stored version.</param>
/// <param name="Scanner">Scanner.</param>
public sealed record ResultName(string Protocol, int Version, long ChangeRequestId, string Scanner)
{
    /// <summary>Name of a row.</summary>
    internal static ResultName Of(ResultRow row) => new(row.Protocol, row.Version, row.ChangeRequestId, row.Scanner);
}

/// <summary>A version that moved on a scanner.</summary>
/// <param name="Result">Which.</param>
/// <param name="Observables">How many numbers moved.</param>
/// <param name="Largest">The one that moved most in proportion, in its text form.</param>
/// <param name="Before">Its value before; null where it was not predictable.</param>
/// <param name="After">Its value now; null where it is not predictable.</param>
public sealed record MovedVersion(ResultName Result, int Observables, string Largest, double? Before, double? After);

/// <summary>A verdict that changed.</summary>
/// <param name="Result">Which.</param>
/// <param name="Expectation">Identifier of the expectation.</param>
/// <param name="Before">Probability of holding before; null where not predictable.</param>
/// <param name="After">Probability now; null where not predictable.</param>
public sealed record ChangedVerdict(ResultName Result, string Expectation, double? Before, double? After);

/// <summary>Compares results row by row.</summary>
internal static class ResultComparison
{
    /// <summary>What moved between two predictions of one row: only numbers that both have.</summary>
    public static MovedVersion? Moved(ResultName name, PackedPrediction old, PackedPrediction now)
    {
        var known = old.Observables.ToHashSet();
        var kept = now.Observables.ToHashSet();
        var moved = RunDifference.Between(old, now).Moved.Where(m => known.Contains(m.Observable) && kept.Contains(m.Observable)).ToList();
        if (moved.Count == 0)
            return null;
        var largest = moved.MaxBy(m => Proportion(m.OldNominal, m.NewNominal))!;
        return new MovedVersion(name, moved.Count, largest.Observable.ToString(), Finite(largest.OldNominal), Finite(largest.NewNominal));
    }

    /// <summary>Verdicts that became failing or holding.</summary>
    public static IEnumerable<(Transition Transition, ChangedVerdict Verdict)> Verdicts(ResultName name, PackedPrediction old, PackedPrediction now) =>
        RunDifference.Between(old, now).Transitions
            .Where(change => change.Transition is Transition.NewlyFails or Transition.NewlyHolds)
            .Select(change => (change.Transition, new ChangedVerdict(name, change.ExpectationId, Finite(change.Old?.Probability), Finite(change.New?.Probability))));

    private static double Proportion(double old, double now) =>
        double.IsFinite(old) && double.IsFinite(now) ? Math.Abs(now - old) / (Math.Abs(old) + Math.Abs(now) + 1e-12) : 2;

    private static double? Finite(double? value) => value is { } number && double.IsFinite(number) ? number : null;
}
