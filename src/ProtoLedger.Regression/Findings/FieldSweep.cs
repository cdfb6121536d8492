using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Findings;

/// <summary>Observables at field points of one's own choice, at the catalogue's mean values: for maps and pictures.</summary>
public static class FieldSweep
{
    /// <summary>One observable over off-resonance and B1+ scale.</summary>
    /// <param name="evaluation">The run's evaluation.</param>
    /// <param name="input">The state.</param>
    /// <param name="key">Names series, observable and tissues; its condition does not count.</param>
    /// <param name="offResonanceHz">Columns, Hz.</param>
    /// <param name="b1Scale">Rows, actual over nominal flip angle, &gt; 0.</param>
    /// <returns>Rows of columns; null where any point cannot be predicted or the series is not there.</returns>
    public static IReadOnlyList<IReadOnlyList<double>>? Map(
        VersionEvaluation evaluation, EvaluationInput input, ObservableKey key, IReadOnlyList<double> offResonanceHz, IReadOnlyList<double> b1Scale)
    {
        ArgumentNullException.ThrowIfNull(key);
        ArgumentNullException.ThrowIfNull(offResonanceHz);
        ArgumentNullException.ThrowIfNull(b1Scale);
        var points = b1Scale.SelectMany(b1 => offResonanceHz.Select(hz => new FieldPoint(b1, hz))).ToArray();
        return Values(evaluation, input, key, points) is { } values
            ? [.. b1Scale.Select((_, row) => (IReadOnlyList<double>)values[(row * offResonanceHz.Count)..((row + 1) * offResonanceHz.Count)])]
            : null;
    }

    /// <summary>One observable at chosen points, as documents limit it: magnitudes where an image has them.</summary>
    /// <param name="evaluation">The run's evaluation.</param>
    /// <param name="input">The state.</param>
    /// <param name="key">Names series, observable and tissues; its condition does not count.</param>
    /// <param name="points">The points.</param>
    /// <returns>One value for each point; null where any cannot be predicted or the series is not there.</returns>
    public static double[]? Values(VersionEvaluation evaluation, EvaluationInput input, ObservableKey key, IReadOnlyList<FieldPoint> points)
    {
        ArgumentNullException.ThrowIfNull(evaluation);
        ArgumentNullException.ThrowIfNull(input);
        ArgumentNullException.ThrowIfNull(key);
        ArgumentNullException.ThrowIfNull(points);
        if (input.Protocol.Document.Series.FirstOrDefault(s => s.Id == key.Series) is not { } series)
            return null;
        var requests = points.Select(point => new ObservableRequest(key.Observable, key.Tissue, key.Reference, point)).ToArray();
        var computer = SeriesEvaluation.Compute(evaluation.Context(input, series), [-1], requests, []);
        var values = requests.Select(computer.Read).ToArray();
        return values.All(v => v.Because is null && double.IsFinite(v.Shown[0])) ? Array.ConvertAll(values, v => v.Shown[0]) : null;
    }

    /// <summary>Ranges of off-resonance, Hz, and B1+ scale that the conditions document covers at the scanner's field.</summary>
    /// <param name="input">The state.</param>
    public static (ValueRange OffResonanceHz, ValueRange B1Scale) Ranges(EvaluationInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        var field = input.Scanner.Document.MagneticFieldStrength;
        var points = input.Conditions.Document.Conditions.SelectMany(c => ConditionPoints.Of(c, field)).ToArray();
        return (
            new(points.Min(p => p.OffResonanceHz), points.Max(p => p.OffResonanceHz)),
            new(points.Min(p => p.B1Scale), points.Max(p => p.B1Scale)));
    }
}
