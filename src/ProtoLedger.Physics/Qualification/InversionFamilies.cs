using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Inversion recovery: signals at an inversion time, or the time that nulls.</summary>
internal sealed class InversionRecoveryFamily : IProtocolFamily
{
    /// <summary>Where a null is asked for, the search starts from this share of the repetition time.</summary>
    private const double StartShare = 0.01;

    public string Name => "inversion_recovery";

    public FamilyProtocol Protocol(CaseInputs inputs) => FamilyProtocol.Of(
        FamilyProtocol.SpinEchoOrTrain(inputs), inputs,
        FamilyProtocol.Inversion(inputs, inputs.OptionalNumber("TI_ms") ?? StartShare * inputs.Number("TR_ms")));

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question)
    {
        var protocol = Protocol(inputs);
        var result = protocol.Signals();
        if (question.Contains("null_TI_ms"))
            result["null_TI_ms"] = NullTimes.Find(protocol.Series, 0, FamilyProtocol.Setting, protocol.Lanes)[0]
                ?? throw new ArgumentException("No inversion time that fits in TR nulls this tissue.");
        return result;
    }
}

/// <summary>Double inversion: signals, or the pair of intervals that nulls two tissues.</summary>
internal sealed class DoubleInversionRecoveryFamily : IProtocolFamily
{
    public string Name => "double_inversion_recovery";

    public FamilyProtocol Protocol(CaseInputs inputs)
    {
        var (first, second) = (inputs.Number("TI1_ms"), inputs.Number("TI2_ms"));
        return FamilyProtocol.Of(
            FamilyProtocol.SpinEchoOrTrain(inputs), inputs, FamilyProtocol.Inversion(inputs, first + second), FamilyProtocol.Inversion(inputs, second));
    }

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question)
    {
        if (!inputs.Has("T1A_ms"))
            return Protocol(inputs).Signals();

        var series = new Series(
            [FamilyProtocol.Inversion(inputs, 2), FamilyProtocol.Inversion(inputs, 1)],
            FamilyProtocol.SpinEchoOrTrain(inputs), new SeriesTiming(), new SeriesGeometry());
        var pair = NullTimes.FindPair(series, FamilyProtocol.Setting, Both(inputs))
            ?? throw new ArgumentException("No pair of inversion times that fits in TR nulls both tissues.");
        return new Dictionary<string, ComputedQuantity> { ["null_TI1_ms"] = pair.FirstToSecond, ["null_TI2_ms"] = pair.SecondToExcitation };
    }

    private static LaneTable Both(CaseInputs inputs)
    {
        var lanes = new LaneTable(2);
        foreach (var (lane, suffix) in new[] { (0, "A"), (1, "B") })
        {
            var one = FamilyProtocol.Lane(inputs, suffix);
            (lanes.T1[lane], lanes.T2[lane], lanes.B1Scale[lane]) = (one.T1[0], one.T2[0], one.B1Scale[0]);
        }

        return lanes;
    }
}
