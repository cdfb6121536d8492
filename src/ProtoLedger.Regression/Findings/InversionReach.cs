using System.Globalization;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Pulses;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Findings;

/// <summary>Where the first inversion of a series stops inverting the slice, in Hz and B1+ scale, before and after an edit.</summary>
internal static class InversionReach
{
    private const string What = "off-resonance that the inversion stands";

    /// <summary>Change of the reach that is told, Hz (the grid of conditions is far coarser; common practice, no source).</summary>
    private const double CountsHz = 10;

    internal static IEnumerable<BalanceLine> Balance(ScannerEvidence evidence, ProtocolSeries series)
    {
        if (Of(evidence, series) is not var (before, after, map))
            yield break;
        yield return new(Direction(before, after), What, series.Id, series.Title, Hz(before), Hz(after), "Hz", Note(evidence, map, after));
    }

    internal static IEnumerable<Finding> Findings(ScannerEvidence evidence, ProtocolSeries series)
    {
        if (Of(evidence, series) is not var (before, after, map))
            yield break;
        var direction = Direction(before, after);
        if (direction == FindingDirection.Same)
            yield break;
        var sentence = $"the inversion reaches {(direction == FindingDirection.Worse ? "less" : "more")} far: {Words(before)} before, {Words(after)} now; {Note(evidence, map, after)}";
        yield return new(
            FindingKind.Suppression, direction, direction == FindingDirection.Worse ? 40 : -10, evidence.ScannerId, series.Id, series.Title, sentence,
            null, null, null, Hz(before), Hz(after), "Hz", [], double.NaN, null, "", null, null, null, null, null, false);
    }

    /// <summary>Limits before and after; null where neither side has a pulse with a shape, or the edit touches none of it.</summary>
    private static (InversionLimits Before, InversionLimits After, InversionMap Map)? Of(ScannerEvidence evidence, ProtocolSeries series)
    {
        var scanner = evidence.Edit.Before.Scanner.Document;
        var old = evidence.Edit.Before.Protocol.Document.Series.FirstOrDefault(s => s.Id == series.Id);
        if (old is null || First(old, scanner) is not { } before || First(series, evidence.Edit.After.Scanner.Document) is not { } after)
            return null;
        var (was, now) = (Pulse(before), Pulse(after));
        return was == now || (was.Pulse is EfficiencyInversion && now.Pulse is EfficiencyInversion) ? null : (before.Limits(), after.Limits(), after);
    }

    private static (RfPulse Pulse, double? Slab, Type? Readout) Pulse(InversionMap map) =>
        (map.Inversion.Pulse, map.Inversion.SlabThickness, map.Inversion.SlabThickness is null ? null : map.Readout?.GetType());

    private static InversionMap? First(ProtocolSeries series, ScannerDocument scanner)
    {
        var acquisition = SeriesMapping.Resolve(series, scanner).Require();
        return acquisition.Preparations.OfType<Inversion>().FirstOrDefault() is { } inversion ? new InversionMap(inversion, acquisition.Readout) : null;
    }

    private static FindingDirection Direction(InversionLimits before, InversionLimits after)
    {
        var change = Reach(after) - Reach(before);
        return change < -CountsHz ? FindingDirection.Worse : change > CountsHz ? FindingDirection.Better : FindingDirection.Same;
    }

    /// <summary>Smaller of the two sides; 0 where it does not even hold on resonance, the whole range where there is no edge.</summary>
    private static double Reach(InversionLimits limits) =>
        limits.HoldsNominally ? Math.Min(-(limits.LowestHz ?? -PulseResponse.LargestOffResonanceHz), limits.HighestHz ?? PulseResponse.LargestOffResonanceHz) : 0;

    private static double? Hz(InversionLimits limits) => Reach(limits) is var reach && reach < PulseResponse.LargestOffResonanceHz ? Math.Round(reach) : null;

    private static string Words(InversionLimits limits) => !limits.HoldsNominally
        ? "nowhere in the slice"
        : Hz(limits) is { } hz ? $"to {Text(hz, "0")} Hz" : "wherever it is used";

    private static string Note(ScannerEvidence evidence, InversionMap map, InversionLimits limits)
    {
        var parts = new List<string> { $"at least {Text(100 * limits.Efficiency, "0")} % of the slice inverted" };
        if (limits.LowestB1Scale is not null || limits.HighestB1Scale is not null)
            parts.Add($"B1+ {Text(limits.LowestB1Scale ?? 0.2, "0.00")} to {Text(limits.HighestB1Scale ?? 2, "0.00")} of nominal");
        var field = evidence.Edit.After.Scanner.Document.MagneticFieldStrength;
        foreach (var condition in evidence.Edit.After.Conditions.Document.Conditions)
        {
            var worst = ConditionPoints.Of(condition, field)
                .Select(p => (Efficiency: map.At(p.B1Scale, p.OffResonanceHz), Point: p))
                .MinBy(x => x.Efficiency);
            if (worst.Efficiency < limits.Efficiency)
                parts.Add($"fails in {condition.Title} by {Cause(map.WhyAt(worst.Point.B1Scale, worst.Point.OffResonanceHz, limits.Efficiency))} at {Text(worst.Point.OffResonanceHz, "0")} Hz and B1+ {Text(worst.Point.B1Scale, "0.00")}");
        }

        return string.Join("; ", parts);
    }

    private static string Cause(InversionFailure failure) => failure switch
    {
        InversionFailure.Shift => "shift of the slab",
        InversionFailure.Bandwidth => "the band of the pulse",
        _ => "the strength of the pulse",
    };

    private static string Text(double value, string format) => value.ToString(format, CultureInfo.InvariantCulture);
}
