using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Tests.Pulses;

public sealed class InversionMapTests
{
    private static readonly HyperbolicSecantPulse Adiabatic = new("adiabatic", 10, 800, 4.9, 700);
    private static readonly WindowedSincPulse Sinc = new("sinc", 180, 4, 4);
    private static readonly EchoTrain Train = new(9000, 120, 90, 10, 24, [150]);

    private static InversionMap Map(RfPulse pulse, double? slab) => new(new Inversion(2400, InversionTimeEnd.Excitation, pulse, slab), Train);

    /// <summary>
    /// Near metal, by hand: the band of the secant is μβ/π = 1247.8 Hz, so its slab of 1.4 slices has an edge 623.9 Hz from the carrier;
    /// a spin in the middle of the shifted slice sees Δf (1 − gradient of the slab over that of the slice) = 0.43 Δf, its far edge half a slice more.
    /// </summary>
    [Fact]
    public void Slab_NearMetal_FailsByItsShift()
    {
        var map = Map(Adiabatic, 1.4);
        var limits = map.Limits();

        Assert.InRange(limits.HighestHz!.Value, 400, 800);
        Assert.Equal(limits.HighestHz.Value, -limits.LowestHz!.Value, 1.0);
        Assert.Equal(InversionFailure.None, map.WhyAt(1, 0));
        Assert.Equal(InversionFailure.Shift, map.WhyAt(1, 1500));
        Assert.Equal(InversionFailure.Amplitude, map.WhyAt(0.3, 0));
    }

    [Fact]
    public void Slab_OfAWindowedSinc_FailsEarlier()
    {
        var (adiabatic, sinc) = (Map(Adiabatic, 2).Limits(0.85), Map(Sinc, 2).Limits(0.85));

        Assert.True(adiabatic.HoldsNominally && sinc.HoldsNominally);
        Assert.True(sinc.HighestHz < 0.5 * adiabatic.HighestHz, $"{sinc.HighestHz} against {adiabatic.HighestHz} Hz");
        Assert.True(sinc.LowestB1Scale > adiabatic.LowestB1Scale + 0.2, $"{sinc.LowestB1Scale} against {adiabatic.LowestB1Scale}");
        Assert.Equal(InversionFailure.Shift, Map(Sinc, 2).WhyAt(1, 600, 0.85));
    }

    /// <summary>An amplitude of 0.85 turns a plain pulse by 153°: −cos 153° = 0.891 (closed form).</summary>
    [Fact]
    public void NonSelective_Sinc_FailsByBandwidthAndAmplitude()
    {
        var map = Map(Sinc, null);
        var limits = map.Limits(-Math.Cos(153 * Math.PI / 180));

        Approximately.Absolute(0.85, limits.LowestB1Scale!.Value, 2e-4);
        Approximately.Absolute(1.15, limits.HighestB1Scale!.Value, 2e-4);
        Assert.Equal(InversionFailure.Bandwidth, map.WhyAt(1, 400));
    }

    /// <summary>Numbers that docs/physics.md gives as an example; made by the program itself.</summary>
    [Fact]
    public void Limits_OfTheDocumentedExample_AreWhatThePageSays()
    {
        var (adiabatic, sinc) = (Map(Adiabatic, 1.4).Limits(), Map(Sinc, null).Limits());

        Assert.Equal((636, 0.53), (Math.Round(adiabatic.HighestHz!.Value), Math.Round(adiabatic.LowestB1Scale!.Value, 2)));
        Assert.Equal((111, 0.86, 1.14), (Math.Round(sinc.HighestHz!.Value), Math.Round(sinc.LowestB1Scale!.Value, 2), Math.Round(sinc.HighestB1Scale!.Value, 2)));
        Assert.False(Map(Sinc, 1.4).Limits().HoldsNominally);
    }

    [Fact]
    public void Efficiency_KnownAsANumber_FailsNowhere()
    {
        var limits = Map(EfficiencyInversion.Default, 1.4).Limits();

        Assert.Equal(new InversionLimits(0.9, true, null, null, null, null), limits);
    }

    /// <summary>Opposite polarities: the slab moves one way, the slice the other, so the inversion fails sooner.</summary>
    [Fact]
    public void Slab_WithOppositePolarity_MovesApart()
    {
        var inversion = new SliceSelection(Adiabatic, GradientPolarity.Positive, 1.4);
        var (same, opposite) = (
            new InversionSlab(inversion, SliceSelection.DefaultExcitation),
            new InversionSlab(inversion with { Polarity = GradientPolarity.Negative }, SliceSelection.DefaultExcitation));
        var (near, far) = (new double[1], new double[1]);

        same.MeanMultiplier([1], [400], near);
        opposite.MeanMultiplier([1], [400], far);

        // 1247.77/1.4 = 891.3 Hz and 1562.5 Hz a slice.
        Approximately.Absolute(-400 * (1 / 891.263 - 1 / 1562.5), same.ShiftAt(400), 1e-5);
        Approximately.Absolute(400 * (1 / 891.263 + 1 / 1562.5), opposite.ShiftAt(400), 1e-5);
        Assert.True(far[0] > near[0] + 0.05, $"{far[0]} against {near[0]}");
    }

    /// <summary>The mean over the slice against a plain sum over 4000 positions.</summary>
    [Theory]
    [InlineData(1, 0)]
    [InlineData(0.8, 450)]
    public void MeanMultiplier_AgainstAFineSum_Agrees(double b1Scale, double offResonanceHz)
    {
        var slab = new InversionSlab(new SliceSelection(Adiabatic, GradientPolarity.Positive, 1.4), SliceSelection.DefaultExcitation);
        var z = Enumerable.Range(0, 4001).Select(i => slab.Excitation.ShiftAt(offResonanceHz) - 1.5 + 3.0 * i / 4000).ToArray();
        var (weight, rest, inverted, mean) = (new double[z.Length], new double[z.Length], new double[z.Length], new double[1]);
        SliceProfile.Excitation(slab.Excitation, b1Scale, offResonanceHz, z, weight, rest);
        slab.Profile(b1Scale, offResonanceHz, z, inverted);

        slab.MeanMultiplier([b1Scale], [offResonanceHz], mean);

        Approximately.Absolute(weight.Zip(inverted, (w, m) => w * m).Sum() / weight.Sum(), mean[0], 2e-3);
    }

    [Fact]
    public void Grid_HasTheOrderOfItsRows()
    {
        var map = Map(Sinc, null);

        Assert.Equal([map.At(0.8, 0), map.At(0.8, 200), map.At(1, 0), map.At(1, 200)], map.Grid([0.8, 1], [0, 200]));
    }
}
