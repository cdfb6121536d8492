using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Physics.Qualification;

/// <summary>A reference case of a hard-pulse family as a series and its lanes.</summary>
/// <param name="Series">The series.</param>
/// <param name="Lanes">One lane, or two for a pair of tissues.</param>
/// <param name="Echo">The echo that a single number means; null is the effective one.</param>
internal sealed record FamilyProtocol(Series Series, LaneTable Lanes, int? Echo = null)
{
    /// <summary>Instantaneous rotations; the field strength enters none of these families.</summary>
    internal static PredictionSetting Setting { get; } = new(1.5, PulseModelling.Ideal);

    internal static FamilyProtocol Of(Readout readout, CaseInputs inputs, params Preparation[] preparations) =>
        new(new Series(preparations, readout, new SeriesTiming(), new SeriesGeometry()), Lane(inputs), EchoIndex(inputs));

    /// <summary>Spin echo, or echo train where an echo spacing is given.</summary>
    internal static Readout SpinEchoOrTrain(CaseInputs inputs, double? repetitionTime = null)
    {
        var flip = inputs.Number("flip_deg", 90);
        if (!inputs.Has("esp_ms"))
            return new SpinEcho(repetitionTime ?? inputs.Number("TR_ms"), inputs.Number("TE_ms"), flip, inputs.Number("refocus_deg", 180));

        var spacing = inputs.Number("esp_ms");
        var angles = inputs.Numbers("refocus_deg");
        var count = inputs.Has("n_echoes") ? (int)inputs.Number("n_echoes") : angles.Length;
        var echo = EchoIndex(inputs) ?? count - 1;
        return new EchoTrain(
            repetitionTime ?? inputs.Number("TR_ms"), (echo + 1) * spacing, flip, spacing, count,
            angles.Length > 1 && angles.All(a => a == angles[0]) ? [angles[0]] : angles, inputs.OptionalNumber("flip_back_deg"));
    }

    /// <summary>The inversion of a case: <c>{type: efficiency, value}</c> or <c>{type: hard, flip_deg}</c>.</summary>
    internal static Inversion Inversion(CaseInputs inputs, double inversionTime)
    {
        var inversion = inputs.Object("inversion");
        RfPulse pulse = inversion.Text("type") switch
        {
            "efficiency" => new EfficiencyInversion("efficiency", inversion.Number("value")),
            "hard" => new HardPulse("hard", inversion.Number("flip_deg", 180)),
            var type => throw new ArgumentException($"/inversion/type: '{type}' is none of efficiency, hard."),
        };
        return new Inversion(inversionTime, InversionTimeEnd.Excitation, pulse);
    }

    internal static LaneTable Lane(CaseInputs inputs, string suffix = "")
    {
        var lanes = new LaneTable(1);
        lanes.T1[0] = inputs.Number($"T1{suffix}_ms");
        lanes.T2Star[0] = inputs.Number($"T2star{suffix}_ms", double.NaN);
        lanes.T2[0] = inputs.Number($"T2{suffix}_ms", double.IsNaN(lanes.T2Star[0]) ? lanes.T1[0] : lanes.T2Star[0]);
        lanes.B1Scale[0] = inputs.Number("B1", 1);
        lanes.OffResonanceHz[0] = inputs.Number("off_resonance_Hz", 0);
        lanes.ApparentDiffusionCoefficient[0] = 1e3 * inputs.Number("D_mm2_per_s", double.NaN);
        return lanes;
    }

    /// <summary>All the numbers that one prediction gives, under the names of the reference files.</summary>
    internal Dictionary<string, ComputedQuantity> Signals()
    {
        var table = SignalPredictor.Predict(Series, Setting, Lanes, PredictionOutputs.AllEchoes);
        var result = new Dictionary<string, ComputedQuantity>
        {
            ["mz_before_excitation"] = table.LongitudinalBeforeExcitation[0],
            ["mz_after_last_echo"] = table.LongitudinalAtEnd[0],
            ["mz_after_flip_back"] = table.LongitudinalAtEnd[0],
            ["mz_before_inversion"] = table.LongitudinalAtStart[0],
            ["echoes"] = table.EchoMagnitudes,
            ["echoes_signed"] = table.Echoes,
        };
        var echo = Echo ?? (Series.Readout is EchoTrain or SpoiledGradientEchoTrain ? null : 0);
        result["signal"] = echo is { } number ? table.EchoMagnitudes[number] : table.Magnitude[0];
        result["signed"] = echo is { } index ? table.Echoes[index] : table.Signed[0];
        return result;
    }

    private static int? EchoIndex(CaseInputs inputs) => inputs.Has("echo_index") ? (int)inputs.Number("echo_index") : null;
}
