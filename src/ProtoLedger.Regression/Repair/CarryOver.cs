using System.Globalization;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Repair;

/// <summary>Looks for the parameters that keep a chosen set of contrasts when a protocol is copied to another scanner.</summary>
public static class CarryOver
{
    /// <summary>Difference that counts as kept when none is given: 5 % of the original, at least 0.03.</summary>
    /// <param name="original">Value on the scanner of origin.</param>
    public static double UsualTolerance(double original) => Math.Max(0.05 * Math.Abs(original), 0.03);

    private const int MostTogether = 3;

    /// <summary>Searches with as few changed parameters as possible: none, one, two, three in each series.</summary>
    /// <param name="evaluation">The run's evaluation.</param>
    /// <param name="original">The protocol where its contrasts are wanted.</param>
    /// <param name="target">The same protocol on the scanner to which it is copied.</param>
    /// <param name="contrasts">Observables to keep, at the nominal point; at least one.</param>
    /// <param name="allowed">Series → parameters that may change; series that are missing take <see cref="RepairParameters.Usual"/>.</param>
    /// <param name="tolerance">Greatest difference for a contrast of an original value; null for <see cref="UsualTolerance"/>.</param>
    /// <remarks>Compass search on the means, steps in the logarithm, snapped to the console's step; a document that does not validate is never proposed.</remarks>
    public static CarryOverResult Find(
        VersionEvaluation evaluation,
        EvaluationInput original,
        EvaluationInput target,
        IReadOnlyList<ObservableKey> contrasts,
        IReadOnlyDictionary<string, IReadOnlyList<RepairParameter>>? allowed = null,
        Func<double, double>? tolerance = null)
    {
        ArgumentNullException.ThrowIfNull(evaluation);
        ArgumentNullException.ThrowIfNull(original);
        ArgumentNullException.ThrowIfNull(target);
        ArgumentNullException.ThrowIfNull(contrasts);
        tolerance ??= UsualTolerance;
        var (settings, carried, proposal) = (new Dictionary<string, IReadOnlyList<RepairSetting>>(), new List<CarriedContrast>(), target.Protocol);
        foreach (var group in contrasts.GroupBy(k => k.Series))
        {
            var wanted = new SeriesTarget(evaluation, original, target, group.Key, [.. group], tolerance);
            var best = Best(wanted, allowed?.GetValueOrDefault(group.Key) ?? RepairParameters.Usual(wanted.Series));
            if (best.Settings.Length > 0)
            {
                proposal = SeriesEdit.Apply(proposal, group.Key, best.Settings)!;
                settings[group.Key] = [.. best.Settings.Select(s => new RepairSetting(s.Pointer, SeriesParameters.Get(wanted.Series, s.Pointer)!.Value, s.Value))];
            }

            carried.AddRange(wanted.Describe(best.Settings));
        }

        var kept = carried.All(c => Math.Abs(c.Carried - c.Original) <= c.Tolerance);
        return new(kept, settings, proposal.Document, carried, Sentence(kept, settings, carried));
    }

    private static (double Misfit, (string Pointer, double Value)[] Settings) Best(SeriesTarget wanted, IReadOnlyList<RepairParameter> parameters)
    {
        (double Misfit, (string, double)[] Settings) best = (wanted.Misfit([]), []);
        var usable = parameters.Where(p => SeriesParameters.Get(wanted.Series, p.Pointer) is > 0 && wanted.Matters(p)).ToArray();
        for (var together = 1; together <= Math.Min(MostTogether, usable.Length) && best.Misfit > 1; together++)
        {
            foreach (var subset in Subsets(usable, together))
            {
                var found = Compass(wanted, subset);
                // Misfit 1 is the edge of the tolerance; once inside, fewer parameters and then the smaller misfit count.
                if (found.Misfit < best.Misfit)
                    best = found;
            }
        }

        return best;
    }

    /// <summary>Compass search: try each parameter up and down, halve the step when nothing helps.</summary>
    private static (double Misfit, (string Pointer, double Value)[] Settings) Compass(SeriesTarget wanted, RepairParameter[] parameters)
    {
        var start = parameters.Select(p => SeriesParameters.Get(wanted.Series, p.Pointer)!.Value).ToArray();
        (string, double)[] Settings(double[] values) => [.. parameters.Select((p, i) => (p.Pointer, values[i])).Where((s, i) => s.Item2 != start[i])];
        var (at, misfit) = (start, wanted.Misfit([]));
        for (var step = 0.4; step > 0.002;)
        {
            var improved = false;
            for (var i = 0; i < parameters.Length; i++)
            {
                foreach (var sign in (int[])[1, -1])
                {
                    var next = (double[])at.Clone();
                    var moved = next[i] * Math.Exp(sign * step);
                    next[i] = RepairParameters.Snap(parameters[i], Math.Abs(moved - next[i]) < parameters[i].Step ? next[i] + sign * parameters[i].Step : moved);
                    if (next[i] == at[i])
                        continue;
                    var trial = wanted.Misfit(Settings(next));
                    if (trial < misfit)
                        (at, misfit, improved) = (next, trial, true);
                }
            }

            if (!improved)
                step /= 2;
        }

        return (misfit, Settings(at));
    }

    private static IEnumerable<RepairParameter[]> Subsets(RepairParameter[] all, int size) => size == 0
        ? [[]]
        : Enumerable.Range(0, all.Length).SelectMany(i => Subsets(all[(i + 1)..], size - 1).Select(rest => (RepairParameter[])[all[i], .. rest]));

    private static string Sentence(bool kept, Dictionary<string, IReadOnlyList<RepairSetting>> settings, List<CarriedContrast> carried)
    {
        var text = string.Join("; ", settings.Select(s => $"{s.Key}: {string.Join(", ", s.Value.Select(v => string.Create(CultureInfo.InvariantCulture, $"{v.Pointer[1..]} {v.Old} to {v.New}")))}"));
        if (kept)
            return settings.Count == 0 ? "The copy keeps the chosen contrasts as it is." : $"The chosen contrasts are kept with {text}.";
        var lost = carried.Where(c => !(Math.Abs(c.Carried - c.Original) <= c.Tolerance)).Select(c => c.Observable.ToString());
        return $"No setting within the limits keeps {string.Join(", ", lost)}{(settings.Count == 0 ? "." : $"; nearest with {text}.")}";
    }

    /// <summary>The chosen contrasts of one series, wanted and had.</summary>
    private sealed class SeriesTarget
    {
        private readonly VersionEvaluation evaluation;
        private readonly EvaluationInput target;
        private readonly string series;
        private readonly ObservableKey[] keys;
        private readonly double[] wanted;
        private readonly double[] tolerances;
        private readonly double[] copied;

        internal SeriesTarget(
            VersionEvaluation evaluation, EvaluationInput original, EvaluationInput target, string series, ObservableKey[] keys, Func<double, double> tolerance)
        {
            (this.evaluation, this.target, this.series, this.keys) = (evaluation, target, series, keys);
            wanted = Values(original) ?? throw new ArgumentException($"The contrasts of series \"{series}\" cannot be predicted on {original.Scanner.Document.Id}.", nameof(keys));
            tolerances = Array.ConvertAll(wanted, value => tolerance(value));
            copied = Values(target) ?? Array.ConvertAll(wanted, _ => double.NaN);
            Series = target.Protocol.Document.Series.First(s => s.Id == series).Acquisition;
        }

        internal Physics.Acquisition.Series Series { get; }

        /// <summary>Largest difference over its tolerance; infinite where the settings are not valid.</summary>
        internal double Misfit((string Pointer, double Value)[] settings) =>
            Had(settings) is { } values ? values.Zip(wanted, tolerances).Max(v => double.IsNaN(v.First) ? double.PositiveInfinity : Math.Abs(v.First - v.Second) / v.Third) : double.PositiveInfinity;

        /// <summary>Whether a parameter moves any of the contrasts at all.</summary>
        internal bool Matters(RepairParameter parameter)
        {
            var old = SeriesParameters.Get(Series, parameter.Pointer)!.Value;
            foreach (var value in (double[])[RepairParameters.Snap(parameter, old * 1.1), RepairParameters.Snap(parameter, old * 0.9), parameter.High, parameter.Low])
            {
                if (value != old && Had([(parameter.Pointer, value)]) is { } values)
                    return values.Zip(copied).Any(v => Drift.RunDifference.HasMoved(v.First, v.Second));
            }

            return false;
        }

        internal IEnumerable<CarriedContrast> Describe((string Pointer, double Value)[] settings)
        {
            var had = Had(settings) ?? copied;
            return keys.Select((key, i) => new CarriedContrast(key, wanted[i], copied[i], had[i], tolerances[i]));
        }

        private double[]? Had((string Pointer, double Value)[] settings) => settings.Length == 0
            ? copied
            : SeriesEdit.Apply(target.Protocol, series, settings) is { } proposal ? Values(target with { Protocol = proposal }) : null;

        /// <summary>Values at the means; null where one cannot be predicted.</summary>
        private double[]? Values(EvaluationInput input)
        {
            if (input.Protocol.Document.Series.FirstOrDefault(s => s.Id == series) is not { } found)
                return null;
            var context = evaluation.Context(input, found);
            var requests = keys.Select(SeriesEvaluation.Request).ToArray();
            var computer = SeriesEvaluation.Compute(context, [-1], requests, []);
            var values = requests.Select(computer.Read).ToArray();
            return values.Any(v => v.Because is not null) ? null : [.. values.Select(v => v.Signed[0])];
        }
    }
}
