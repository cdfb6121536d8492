using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Attribution;

/// <summary>Says which changed parameters moved which numbers.</summary>
/// <remarks>
/// Shares are Shapley values of the signed number: the average over all orders in which the changes could be made.
/// Changes that are not valid apart are one player; so is a block that is added or removed. Exact up to 12 players, sampled beyond.
/// </remarks>
public static class ChangeAttribution
{
    private const ulong OrderSeed = 0x5EED;

    /// <summary>Attributes every observable that changed, at the nominal tissue values, and every expectation that does not hold any more at its worst lane.</summary>
    /// <param name="evaluation">The run's evaluation, whose draws are used.</param>
    /// <param name="before">The state before.</param>
    /// <param name="after">The state after: the same scanner, edited documents.</param>
    /// <param name="old">Prediction before.</param>
    /// <param name="now">Prediction after.</param>
    /// <returns>Series by series; nothing for a series that was added or removed as a whole, since there is but one cause.</returns>
    public static IReadOnlyList<AttributionResult> Attribute(
        VersionEvaluation evaluation, EvaluationInput before, EvaluationInput after, EvaluationResult old, EvaluationResult now)
    {
        ArgumentNullException.ThrowIfNull(evaluation);
        var edit = new EditedInput(before, after, evaluation.Mixtures);
        var moved = RunDifference.Between(old, now).Moved
            .Where(m => double.IsFinite(m.OldNominal) && double.IsFinite(m.NewNominal) && RunDifference.HasMoved(m.OldNominal, m.NewNominal))
            .Select(m => m.Observable)
            .ToLookup(key => key.Series);
        var held = old.Expectations.ToDictionary(o => o.Expectation.Id, o => o.Verdict);
        var broken = now.Expectations
            .Where(o => o.Worst is not null && o.Verdict is Verdict.Fails or Verdict.Uncertain && held.GetValueOrDefault(o.Expectation.Id, Verdict.NotPredictable) != Verdict.NotPredictable)
            .ToLookup(o => o.Expectation.Series);
        return
        [
            .. after.Protocol.Document.Series
                .Where(s => before.Protocol.Document.Series.Any(o => o.Id == s.Id) && moved[s.Id].Any())
                .SelectMany(s => AttributeSeries(evaluation, edit, s.Id, [.. moved[s.Id]], [.. broken[s.Id]])),
        ];
    }

    private static IEnumerable<AttributionResult> AttributeSeries(
        VersionEvaluation evaluation, EditedInput edit, string series, ObservableKey[] moved, ExpectationOutcome[] broken)
    {
        var tissues = moved.SelectMany(k => (string?[])[k.Tissue, k.Reference]).OfType<string>().ToHashSet();
        var players = Players.Of(edit, series, tissues);
        if (players.Length == 0)
            return [];
        var targets = Targets(evaluation, edit, series, moved, broken);
        double[]? Value(int[] moving, IReadOnlyList<int> taken)
        {
            // What cannot move the series is taken over from the start, so that mixtures are valid wherever possible.
            var rest = Enumerable.Range(0, edit.Changes.Count).Except(moving);
            var mixture = edit.Mix(rest.Concat(taken.Select(i => moving[i])).ToHashSet());
            return mixture is null ? null : Values(evaluation, mixture, series, targets);
        }

        if (Value(players, []) is null)
            players = [.. players, .. Players.Companions(edit, series)];
        if (players.Length > Shapley.MostPlayers)
            return [];
        var (coupling, shares) = Coupling.Attribute(players.Length, taken => Value(players, taken), OrderSeed);
        if (shares.Old.Length != 2 * targets.Count || shares.New.Length != 2 * targets.Count)
            return [];
        return targets.Select((target, k) => (target, k)).Where(t => IsComplete(shares, t.k)).Select(t => Result(t.target, t.k));

        AttributionResult Result(Target target, int k) => new(
            target.Key,
            target.Lane,
            shares.Old[2 * k],
            shares.New[2 * k],
            shares.Old[2 * k + 1],
            shares.New[2 * k + 1],
            [
                .. coupling.Players
                    .Select((members, p) => new AttributionShare(
                        [.. members.Select(i => edit.Changes[players[i]]).Where(c => !Players.IsCompanion(c))], shares.Shares[p, 2 * k], shares.StandardErrors[p, 2 * k]))
                    .Where(share => share.Changes.Count > 0)
                    .OrderByDescending(share => Math.Abs(share.Share)),
            ],
            shares.Orders);
    }

    private static bool IsComplete(ShapleyShares shares, int target)
    {
        for (var player = 0; player < shares.Shares.GetLength(0); player++)
        {
            if (!double.IsFinite(shares.Shares[player, 2 * target]))
                return false;
        }

        return true;
    }

    private sealed record Target(ObservableKey Key, string Lane, ObservableRequest Request, int Draw);

    private static List<Target> Targets(VersionEvaluation evaluation, EditedInput edit, string series, ObservableKey[] moved, ExpectationOutcome[] broken)
    {
        var context = evaluation.Context(edit.After, edit.After.Protocol.Document.Series.First(s => s.Id == series));
        var targets = moved.Select(key => new Target(key, "nominal", Request(key, NominalPoint(context, key)), -1)).ToList();
        targets.AddRange(broken.Select(o => new Target(o.Observable, "worst", Request(o.Observable, o.Worst!.Point), o.Worst.Sample)));
        return targets;
    }

    private static ObservableRequest Request(ObservableKey key, FieldPoint point) => new(key.Observable, key.Tissue, key.Reference, point);

    /// <summary>The point of a condition's ranges at which the number is extreme after the edit.</summary>
    private static FieldPoint NominalPoint(SeriesContext context, ObservableKey key)
    {
        if (context.Conditions.Conditions.FirstOrDefault(c => c.Name == key.Condition) is not { } condition)
            return ConditionPoints.Nominal;
        var points = ConditionPoints.Of(condition, context.FieldStrength);
        var computer = SeriesEvaluation.Compute(context, [-1], [.. points.Select(p => Request(key, p))], []);
        double At(FieldPoint point) => computer.Read(Request(key, point)).Shown is [var value] ? value : double.NaN;
        return key.Extreme == RangeExtreme.Lowest ? points.MinBy(At)! : points.MaxBy(At)!;
    }

    /// <summary>Signed and shown value of every target, in turn, NaN where one is undefined; null where the mixture cannot be played.</summary>
    private static double[]? Values(VersionEvaluation evaluation, EvaluationInput mixture, string seriesId, List<Target> targets)
    {
        if (mixture.Protocol.Document.Series.FirstOrDefault(s => s.Id == seriesId) is not { } series)
            return null;
        SeriesContext context;
        try
        {
            context = evaluation.Context(mixture, series);
        }
        catch (InvalidOperationException)
        {
            // The scanner of this mixture lacks a pulse that the series of this mixture names.
            return null;
        }

        var values = new double[2 * targets.Count];
        foreach (var group in targets.Select((target, index) => (target, index)).GroupBy(t => t.target.Draw))
        {
            var computer = SeriesEvaluation.Compute(context, [group.Key], [.. group.Select(t => t.target.Request)], []);
            foreach (var (target, index) in group)
            {
                var read = computer.Read(target.Request);
                (values[2 * index], values[2 * index + 1]) = read.Because is null ? (read.Signed[0], read.Shown[0]) : (double.NaN, double.NaN);
            }
        }

        // A mixture that cannot be played at all is no state between old and new; one number that it lacks is left out alone.
        var ofTissues = Enumerable.Range(0, targets.Count).Where(i => targets[i].Key.Tissue is not null).ToArray();
        return ofTissues.Length > 0 && ofTissues.All(i => double.IsNaN(values[2 * i])) ? null : values;
    }
}
