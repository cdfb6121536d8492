using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.PulsePrograms;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Names what a prediction takes for granted: every default that the series leaves open, and what the model leaves out.</summary>
internal static class Assumptions
{
    internal static IReadOnlyList<Assumption> Of(Series series, PredictionSetting setting, LaneTable lanes, CompiledSeries program) =>
    [
        .. Start(series, program),
        .. Pulses(series, setting),
        .. Readout(series, program, lanes),
        .. Mixing(series, lanes),
        new("magnetisationTransferLeftOut", "Magnetisation transfer, flow, motion and exchange between compartments are left out."),
    ];

    private static IEnumerable<Assumption> Start(Series series, CompiledSeries program)
    {
        yield return series.Timing.State switch
        {
            StartState.FirstShot => new("firstShot", "The first repetition after rest is predicted, from equilibrium."),
            StartState.AfterDummies => new("afterDummies", $"The repetition after {series.Timing.DummyRepetitions} dummy repetitions is predicted, from equilibrium."),
            _ => new Assumption("steadyState", "The steady state over many repetitions is predicted."),
        };
        yield return program.Closure switch
        {
            Closure.Balanced => new("balanced", "All gradients are balanced; the RF phase alternates, so the pass band is centred on resonance."),
            Closure.RfSpoiled => new("rfSpoiling", "RF spoiling with the stated phase increment and one cycle of dephasing a repetition time."),
            _ => new Assumption("noCoherenceCrosses", "No coherence crosses from one repetition to the next; only the mean longitudinal magnetisation does."),
        };
        if (series.Timing.Trigger != SeriesTrigger.None)
            yield return new("setRepetitionTime", $"The repetition time is {series.Readout.RepetitionTime} ms as set; with a trigger it follows the rate.");
    }

    private static IEnumerable<Assumption> Pulses(Series series, PredictionSetting setting)
    {
        yield return new("instantaneousPulses", "Excitation and refocusing pulses are instantaneous rotations, the same across the slice, scaled by B1+.");
        foreach (var inversion in series.Preparations.OfType<Inversion>())
        {
            yield return inversion.Pulse is EfficiencyInversion efficiency
                ? new("inversionPulse", $"Inversion pulse '{efficiency.Name}': M becomes −{efficiency.Efficiency} M, whatever B1+ and off-resonance are.")
                : new("inversionPulse", $"Inversion pulse '{inversion.Pulse.Name}' is {(setting.Pulses == PulseModelling.Ideal ? "an ideal rotation where it has a flip angle" : "integrated over B1+ and off-resonance")}.");
            if (InversionSlab.Of(inversion, series.Readout) is not null)
                yield return new(
                    "selectiveSlab",
                    $"The inverted slab is {inversion.SlabThickness} slice thicknesses thick, under a gradient of the polarity of the slice's; "
                    + "the slice is assumed to be selected by windowed sinc pulses of 2.56 ms and time-bandwidth product 4.");
            yield return inversion.End switch
            {
                InversionTimeEnd.KSpaceCentre => new("inversionTimeEnd", "The inversion time ends at the excitation that fills the centre of k-space."),
                InversionTimeEnd.NextInversion => new("inversionTimeEnd", "The inversion time ends at the next inversion."),
                _ => new Assumption("inversionTimeEnd", "The inversion time ends at the first excitation of the readout."),
            };
        }

        if (series.Preparations.Any(p => p is SpectralSaturation or SpectralInversion))
            yield return new(
                "spectralPerSlice",
                $"The spectral pulse recurs once for each of {Timeline.SlicesPerRepetition(series)} slices a repetition, evenly spread; it acts on all slices.");
        if (series.Preparations.Any(p => p is T2Preparation))
            yield return new("t2PreparationCrushers", "T2 preparation refocuses with pulses of 180° scaled by B1+, with crushers around each, and tips back with −90°.");
    }

    private static IEnumerable<Assumption> Readout(Series series, CompiledSeries program, LaneTable lanes)
    {
        var readout = series.Readout;
        if (readout is SpinEcho or EchoTrain or DiffusionSpinEcho)
            yield return new("crushers", "Crushers around each refocusing pulse are ideal; all echoes that meet the timing of the train count.");
        if (readout is SpoiledGradientEcho { SpoilingIncrement: null } or SpoiledGradientEchoTrain)
            yield return new("idealSpoiling", "Transverse magnetisation is spoiled ideally before every excitation.");
        if (program.Closure == Closure.RfSpoiled && Array.Exists(lanes.T2Star, double.IsNaN))
            yield return new("t2InsteadOfT2Star", "Where T2* is unknown, the decay to the echo is that of T2.");
        if (readout is SpoiledGradientEcho { SpoilingIncrement: not null } or BalancedGradientEcho && program.Closure == Closure.Longitudinal)
            yield return new("preparationSpoils", "A preparation in every repetition spoils what would cross it, so the readout is predicted with ideal spoiling.");
        if (Array.Exists(lanes.IsFat, fat => fat))
            yield return program.ShiftTurnsPhase
                ? new("fatSpectrum", "Fat has six peaks; the frame is that of water, with the field error taken out.")
                : new Assumption("fatInPhase", "All peaks of fat are in phase at the spin echo; scalar coupling is left out.");
    }

    private static IEnumerable<Assumption> Mixing(Series series, LaneTable lanes)
    {
        if (series.Preparations.Count > 0 && Array.Exists(lanes.UnpreparedInflow, fraction => fraction > 0))
            yield return new("unpreparedInflow", "The stated fraction of spins missed all preparations and comes from equilibrium; signals add with their sign.");
    }
}
