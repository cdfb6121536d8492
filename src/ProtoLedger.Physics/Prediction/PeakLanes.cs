using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Lanes as the engine takes them: a lane of fat is six lanes, one a peak, where the series can tell the peaks apart.</summary>
internal sealed class PeakLanes
{
    private PeakLanes(LaneTable lanes, double[]? shiftPpm, int[]? owner, double[]? amplitude)
    {
        Lanes = lanes;
        ShiftPpm = shiftPpm;
        Owner = owner;
        Amplitude = amplitude;
    }

    /// <summary>The lanes, peaks apart.</summary>
    internal LaneTable Lanes { get; }

    /// <summary>Chemical shift of each lane, ppm; null where all are those of the table itself.</summary>
    internal double[]? ShiftPpm { get; }

    /// <summary>Lane of the original table that each belongs to; null as <see cref="ShiftPpm"/>.</summary>
    internal int[]? Owner { get; }

    /// <summary>Share of the original lane's signal; null as <see cref="ShiftPpm"/>.</summary>
    internal double[]? Amplitude { get; }

    internal static PeakLanes Of(LaneTable lanes, bool apart)
    {
        if (!apart || !Array.Exists(lanes.IsFat, fat => fat))
            return new PeakLanes(lanes, null, null, null);

        var peaks = FatSpectrum.Peaks;
        var owner = new List<int>();
        var shift = new List<double>();
        var amplitude = new List<double>();
        for (var i = 0; i < lanes.Count; i++)
        {
            for (var p = 0; p < (lanes.IsFat[i] ? peaks.Count : 1); p++)
            {
                owner.Add(i);
                shift.Add(lanes.IsFat[i] ? peaks[p].ShiftPpm : 0);
                amplitude.Add(lanes.IsFat[i] ? peaks[p].Amplitude : 1);
            }
        }

        var owners = owner.ToArray();
        return new PeakLanes(lanes.Select(owners), [.. shift], owners, [.. amplitude]);
    }
}
