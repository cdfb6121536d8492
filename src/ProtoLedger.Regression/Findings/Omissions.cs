using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Attribution;

namespace ProtoLedger.Regression.Findings;

/// <summary>What the model leaves out, told by what an edit touches.</summary>
internal static class Omissions
{
    private sealed record Rule(string Effect, string Text, Func<ChangedParameter, Series?, bool> Applies);

    private static readonly Rule[] Rules =
    [
        new(
            "magnetisation transfer",
            "Off-resonance pulses of the other slices saturate protein-bound water: white matter, muscle and liver lose more signal than fluid and fat when more pulses or larger angles are played in a repetition. The prediction holds none of this, so real tissue differs from it more than before the edit.",
            (c, s) => (c.Change.Name is "slices" or "concatenations" or "RefocusingFlipAngles" or "EchoTrainLength" or "RepetitionTime" or "ExcitationFlipAngle" || Under(c, "RefocusingFlipAngles"))
                && s is { Geometry.Dimensions: 2, Readout: EchoTrain or SpinEcho, Timing.Slices: > 1 }),
        new(
            "inflow",
            "Fluid and blood that move into the slice between preparation and readout are bright whatever the inversion time is. Only the stated unprepared fractions are predicted, not their place or pulsation.",
            (c, s) => c.Change.Name is "InversionTime" or "RepetitionTime" or "slabThickness" or "slices" or "pulse" or "inversion" or "preparations" && s is not null && s.Preparations.OfType<Inversion>().Any()),
        new(
            "first shots",
            "The steady state is predicted; the first repetitions after the start differ from it, and more so for long T1.",
            (c, s) => c.Change.Name is "RepetitionTime" or "dummyRepetitions" or "state" && s is { Timing.State: StartState.Steady }),
        new(
            "slice profile of imaging pulses",
            "Refocusing below 180° has a profile of its own across the slice, and neighbouring slices share their edges; angles are predicted as if the whole slice saw them.",
            (c, _) => c.Change.Name is "RefocusingFlipAngles" or "ExcitationFlipAngle" or "sliceGap" or "SliceThickness" || Under(c, "RefocusingFlipAngles")),
        new(
            "coupled spins of fat",
            "Fat gets brighter with closely spaced refocusing pulses because its protons are coupled; the catalogue's one T2 of fat does not follow the echo spacing.",
            (c, s) => c.Change.Name is "echoSpacing" or "EchoTrainLength" or "EchoTime" && s?.Readout is EchoTrain),
        new(
            "susceptibility",
            "Signal loss near air, metal and blood products grows with the echo time of a gradient echo and with field; one T2* for each tissue stands for all of it.",
            (c, s) => (c.Change.Name is "EchoTime" && s?.Readout is SpoiledGradientEcho or SpoiledGradientEchoTrain) || c.Change.Name is "MagneticFieldStrength"),
        new(
            "geometry factor",
            "Noise amplification of parallel imaging depends on coil and anatomy and is taken as none; real noise rises more.",
            (c, _) => c.Change.Name is "acceleration"),
        new(
            "restricted and perfused water",
            "Diffusion is predicted with one coefficient for each tissue, without restriction, perfusion or eddy currents.",
            (c, _) => c.Change.Name is "DiffusionBValue"),
        new(
            "irregular rhythm",
            "A triggered series follows the heart or the breath; an irregular one changes the repetition time from shot to shot.",
            (c, s) => c.Change.Name is "trigger" or "RepetitionTime" && s is { Timing.Trigger: not SeriesTrigger.None }),
        new(
            "uptake of contrast agent",
            "One concentration stands for all enhancing tissue; its course in time and water exchange are left out.",
            (c, _) => c.Change.Name is "contrastConcentration" or "dose" or "delay" && c.Change.Pointer.Contains("ontrast", StringComparison.Ordinal)),
        new(
            "spread between patients",
            "The catalogue's spread covers disagreement between publications; disease, age and temperature can lie outside it.",
            (c, _) => c.Document == DocumentKind.Catalogue),
        new(
            "where the field is off",
            "A condition is a range, not a map: where in a patient it occurs is not predicted.",
            (c, _) => c.Document == DocumentKind.Conditions || c.Change.Name is "pulse" or "slabThickness"),
    ];

    internal static IReadOnlyList<Omission> For(IReadOnlyList<ChangedParameter> changes, ProtocolDocument after)
    {
        var found = new List<Omission>();
        foreach (var rule in Rules)
        {
            var because = changes.Where(c => rule.Applies(c, SeriesOf(c, after))).Select(c => int.TryParse(c.Change.Name, out _) ? c.Change.Label : c.Change.Name).Distinct().ToArray();
            if (because.Length > 0)
                found.Add(new(rule.Effect, rule.Text, because));
        }

        return found;
    }

    private static Series? SeriesOf(ChangedParameter changed, ProtocolDocument after) =>
        after.Series.FirstOrDefault(s => s.Id == changed.Change.SeriesId)?.Acquisition;

    private static bool Under(ChangedParameter changed, string name) => changed.Change.Pointer.Contains($"/{name}/", StringComparison.Ordinal);
}
