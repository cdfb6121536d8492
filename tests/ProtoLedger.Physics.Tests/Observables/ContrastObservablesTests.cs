using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Physics.Tests.Observables;

public sealed class ContrastObservablesTests
{
    [Fact]
    public void Contrast_OfSignedSignals_IsThatOfMagnitudes()
    {
        Assert.Equal(0.1, Contrast.Difference(-0.3, 0.2), 12);
        Assert.Equal(1.5, Contrast.Ratio(-0.3, 0.2), 12);
        Assert.Equal(1, Contrast.Ratio(0, 0));
        Assert.Equal(double.PositiveInfinity, Contrast.Ratio(0.1, 0));
    }

    /// <summary>Fluid 0.02 beside white matter 0.2, then 0.02 beside 0.1: the ratio doubled although fluid stayed.</summary>
    [Fact]
    public void ResidualRatio_WhenOnlyTheReferenceMoved_SaysSo()
    {
        var change = ResidualRatio.Between(0.02, 0.2, -0.02, 0.1);

        Assert.Equal(0.1, change.Before, 12);
        Assert.Equal(0.2, change.After, 12);
        Assert.Equal(-0.5, change.ReferenceChange, 12);
        Assert.True(change.ReferenceMoved);
        Assert.False(ResidualRatio.Between(0.02, 0.2, 0.1, 0.2).ReferenceMoved);
    }

    /// <summary>Inverted fluid and upright brain in one voxel cancel: the magnitude is that of the signed sum, not the sum of magnitudes.</summary>
    [Fact]
    public void PartialVolume_MixesSignedSignals()
    {
        Approximately.Absolute(0, PartialVolume.Mix([0.25, 0.75], [-0.3, 0.1]), 1e-15);
        Assert.Contains("add up to 0.75", Assert.Throws<ArgumentException>(() => PartialVolume.Mix([0.25, 0.5], [1, 1])).Message, StringComparison.Ordinal);
        Assert.Contains("Fraction 1 is -0.2", Assert.Throws<ArgumentException>(() => PartialVolume.Mix([1, -0.2], [1, 1])).Message, StringComparison.Ordinal);
    }

    /// <summary>|1 − 2 exp(−TI/T1)| ≤ limit lies between T1 ln(2/(1 + limit)) and T1 ln(2/(1 − limit)) (closed form).</summary>
    [Fact]
    public void NullWindow_OfAPerfectInversion_MeetsTheClosedForm()
    {
        const double T1 = 4300, Limit = 0.05;
        var window = NullWindow.Find(ti => 1 - 2 * Math.Exp(-ti / T1), T1 * Math.Log(2), 100, 9000, Limit)!.Value;

        Approximately.Relative(T1 * Math.Log(2 / (1 + Limit)), window.Low, 1e-8);
        Approximately.Relative(T1 * Math.Log(2 / (1 - Limit)), window.High, 1e-8);
        Approximately.Relative(window.High - window.Low, window.Width, 1e-12);
    }

    [Fact]
    public void NullWindow_WhereTheLimitDoesNotHold_IsNone() => Assert.Null(NullWindow.Find(_ => 1, 1, 0, 2, 0.5));

    [Fact]
    public void NullWindow_OpenAtTheEnd_StopsThere() => Assert.Equal(new NullWindow(0, 2), NullWindow.Find(_ => 0.1, 1, 0, 2, 0.5));

    /// <summary>S = 1 − 2 exp(−TI/T1): ∂S/∂ln T1 = −2 (TI/T1) exp(−TI/T1); before the null a longer T1 makes a magnitude image brighter.</summary>
    [Fact]
    public void Weighting_BelowTheNull_HasTheSignOfTheMagnitude()
    {
        var (ti, t1) = (300.0, 1000.0);
        var derivative = -2 * ti / t1 * Math.Exp(-ti / t1);
        var signed = 1 - 2 * Math.Exp(-ti / t1);

        Assert.True(signed < 0);
        Approximately.Relative(-derivative / 0.5, Weighting.Of(derivative, signed, 0.5), 1e-12);
    }

    /// <summary>Pure T2 decay gives the echo time itself.</summary>
    [Fact]
    public void ContrastEquivalentEchoTime_OfPureDecay_IsTheEchoTime() =>
        Approximately.Relative(92, ContrastEquivalentEchoTime.Of(0.8 * Math.Exp(-92 / 75.0), 0.8, 75), 1e-12);

    [Fact]
    public void SliceFit_CountsPulsesAndReadout()
    {
        // 10 ms inversion; 24 echoes of 10 ms and half a spacing; 3 ms of gradients: 258 ms a slice.
        var series = new Series(
            [new Inversion(2400, InversionTimeEnd.Excitation, EfficiencyInversion.Default)],
            new EchoTrain(9000, 120, 90, 10, 24, [150]),
            new SeriesTiming(30),
            new SeriesGeometry());

        var fit = SliceFit.Of(series);

        Assert.Equal(258, fit.BusyTime, 9);
        Assert.Equal(30, fit.SlicesPerConcatenation);
        Assert.Equal(7740, fit.Needed, 6);
        Assert.True(fit.Fits);
        Assert.Equal(1, fit.ConcatenationsNeeded);
        var shorter = SliceFit.Of(series with { Readout = new EchoTrain(6000, 120, 90, 10, 24, [150]) });
        Assert.False(shorter.Fits);
        Assert.Equal(2, shorter.ConcatenationsNeeded);
    }

    /// <summary>Beats from 50 to 75 a minute last 1200 to 800 ms: 1500 ms needs two beats, 1600 to 2400 ms.</summary>
    [Fact]
    public void RepetitionPeriod_OfACardiacSeries_IsWholeBeats()
    {
        var timing = new SeriesTiming(Trigger: SeriesTrigger.Cardiac, HeartRate: new RateRange(50, 75));
        var series = new Series([], new SpinEcho(1500, 20, 90, 180), timing, new SeriesGeometry());

        var (shortest, longest) = RepetitionPeriod.Range(series);

        Assert.Equal(1600, shortest, 9);
        Assert.Equal(2400, longest, 9);
    }

    /// <summary>1000 ms at 50 to 75 a minute: one beat of up to 1200 ms where it is at least 1000 ms, two of 800 to 1000 ms otherwise.</summary>
    [Fact]
    public void RepetitionPeriod_WhereTheNumberOfBeatsChanges_LooksAtAll()
    {
        var timing = new SeriesTiming(Trigger: SeriesTrigger.Cardiac, HeartRate: new RateRange(50, 75));
        var series = new Series([], new SpinEcho(1000, 20, 90, 180), timing, new SeriesGeometry());

        var (shortest, longest) = RepetitionPeriod.Range(series);

        Assert.Equal(1000, shortest, 9);
        Assert.Equal(2000, longest, 9);
    }
}
