using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Physics.Tests.PulsePrograms;

/// <summary>
/// Check values of the echoes of three pulses (H…): pulses at 0, τ = 1 unit and T = 10 units; echoes at 2τ, T + τ, 2T, 2T − 2τ, 2T − τ.
/// Source: Hahn, Phys Rev 1950;80:580 (from memory), amplitudes derived. Amplitudes do not depend on the phases of the pulses, since each pathway
/// echoes at its own time; here the second and third pulse are about the other axis. H5 starts along z and is no echo of the tipped magnetisation.
/// </summary>
public sealed class ThreePulseTests
{
    private const int Tau = 1;
    private const int Third = 10;
    private const double Unit = 10;

    [Theory]
    [InlineData("H1", 90, 90, 90, 2 * Tau, 0.5)]
    [InlineData("H1", 90, 120, 90, 2 * Tau, 0.75)]
    [InlineData("H1", 60, 120, 90, 2 * Tau, 0.649519)]
    [InlineData("H1", 90, 60, 90, 2 * Tau, 0.25)]
    [InlineData("H2", 90, 90, 90, Third + Tau, 0.5)]
    [InlineData("H2", 90, 60, 60, Third + Tau, 0.375)]
    [InlineData("H2", 90, 120, 120, Third + Tau, 0.375)]
    [InlineData("H2", 30, 60, 90, Third + Tau, 0.216506)]
    [InlineData("H3", 90, 90, 90, 2 * Third, 0.25)]
    [InlineData("H3", 90, 60, 60, 2 * Third, 0.1875)]
    [InlineData("H3", 30, 60, 90, 2 * Third, 0.1875)]
    [InlineData("H4", 90, 90, 90, 2 * Third - 2 * Tau, 0.25)]
    [InlineData("H4", 90, 120, 120, 2 * Third - 2 * Tau, 0.5625)]
    [InlineData("H4", 30, 60, 90, 2 * Third - 2 * Tau, 0.0625)]
    public void Echo_WithoutRelaxation_IsTheCheckValue(string number, double first, double second, double third, int time, double expected)
    {
        Assert.NotEmpty(number);
        Predictions.Close(expected, Math.Abs(Echo(first, second, third, time, 1e12, 1e12)), 3e-6);
    }

    /// <summary>H7: the stimulated echo decays with T2 while it is transverse and with T1 while it is stored.</summary>
    [Fact]
    public void Echo_H7StimulatedWithRelaxation_IsTheCheckValue()
    {
        // 2τ = 20 ms transverse, T − τ stored: 9 units of 100/9 ms, the others of 10 ms.
        var echo = Echo(90, 90, 90, Third + Tau, 1000, 50, stored: 100.0 / (Third - Tau));

        Predictions.Close(0.303265, Math.Abs(echo));
    }

    private static unsafe double Echo(double first, double second, double third, int time, double t1, double t2, double stored = Unit)
    {
        var steps = new List<PulseStep> { new(StepKind.Excite, 0) };
        for (var i = 0; i < time; i++)
        {
            if (i == Tau)
                steps.Add(new(StepKind.Refocus, 1));
            if (i == Third)
                steps.Add(new(StepKind.Refocus, 2));
            steps.Add(new(StepKind.Wait, i >= Tau && i < Third ? 1 : 0));
            steps.Add(new(StepKind.Dephase));
        }

        steps.Add(new(StepKind.Sample));
        var plan = ProgramPlan.Build([.. steps], 0);
        double signed, before, end, period, b1 = 1;
        Engine.Run(plan, [Unit, stored], [first, second, third], new EngineArguments
        {
            Count = 1, T1 = &t1, T2 = &t2, B1 = &b1, Start = Physics.Acquisition.StartState.FirstShot,
            Signed = &signed, Before = &before, End = &end, Period = &period,
        });
        return signed;
    }
}
