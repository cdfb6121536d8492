using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Where the preparations of a series stand before its excitation.</summary>
internal static class InversionTiming
{
    /// <summary>From the beginning of an excitation pulse to its centre, ms; common practice, no source.</summary>
    public const double HalfExcitation = 1;

    /// <summary>From the centre of each preparation's (first) pulse to the excitation centre, ms, in the order in which they are played.</summary>
    public static IReadOnlyList<double> BeforeExcitation(Series series)
    {
        var times = new double[series.Preparations.Count];
        var following = 0.0;
        for (var i = series.Preparations.Count - 1; i >= 0; i--)
        {
            times[i] = series.Preparations[i] switch
            {
                Inversion { End: InversionTimeEnd.NextInversion } block => block.InversionTime + NextInversion(series, times, i),
                Inversion { End: InversionTimeEnd.KSpaceCentre } block => block.InversionTime - ToKSpaceCentre(series.Readout),
                Inversion block => block.InversionTime,
                T2Preparation block => following + block.Delay + block.PreparationTime,
                SpectralSaturation block => following + block.Delay + SliceFit.PulseDuration(block.Pulse) / 2,
                SpectralInversion block => block.InversionTime,
                _ => following,
            };
            following = times[i];
        }

        return times;
    }

    /// <summary>From the excitation centre to the pulse whose echo fills the centre of k-space, ms; 0 where that is the excitation itself.</summary>
    public static double ToKSpaceCentre(Readout readout) =>
        readout is SpoiledGradientEchoTrain train ? train.CentreIndex * train.ReadoutSpacing : 0;

    private static double NextInversion(Series series, double[] times, int index)
    {
        for (var i = index + 1; i < times.Length; i++)
            if (series.Preparations[i] is Inversion)
                return times[i];
        return 0;
    }
}
