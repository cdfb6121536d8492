using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Pulses;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Fills the columns of the pulses that enter a program as maps: multiplier and recovery, lane by lane.</summary>
internal static class MapColumns
{
    internal static void Fill(CompiledSeries program, Readout readout, PredictionSetting setting, PeakLanes peaks, Span<double> columns)
    {
        var count = peaks.Lanes.Count;
        for (var i = 0; i < program.Maps.Count; i++)
        {
            var multiplier = columns.Slice(2 * i * count, count);
            var recovery = columns.Slice((2 * i + 1) * count, count);
            recovery.Clear();
            switch (program.Maps[i].Preparation)
            {
                case Inversion inversion:
                    Invert(inversion, readout, setting, peaks, multiplier);
                    break;
                case SpectralSaturation saturation:
                    Spectral(saturation.Pulse, saturation.CarrierDetuneHz, setting, peaks, multiplier, recovery);
                    break;
                case SpectralInversion inversion:
                    Spectral(inversion.Pulse, inversion.CarrierDetuneHz, setting, peaks, multiplier, recovery);
                    break;
            }
        }
    }

    private static void Invert(Inversion inversion, Readout readout, PredictionSetting setting, PeakLanes peaks, Span<double> multiplier)
    {
        var lanes = peaks.Lanes;
        if (inversion.Pulse is EfficiencyInversion efficiency)
        {
            Efficiency(efficiency, lanes, multiplier);
            return;
        }

        if (setting.Pulses == PulseModelling.Ideal && FlipAngle(inversion.Pulse) is { } angle)
        {
            Rotate(angle, lanes.B1Scale, multiplier);
            return;
        }

        var frequencies = Frequencies(setting, peaks);
        if (InversionSlab.Of(inversion, readout) is { } slab)
            slab.MeanMultiplier(lanes.B1Scale, frequencies, multiplier);
        else
            PulseResponse.Longitudinal(inversion.Pulse, lanes.B1Scale, frequencies, multiplier);
    }

    private static void Efficiency(EfficiencyInversion pulse, LaneTable lanes, Span<double> multiplier)
    {
        for (var i = 0; i < multiplier.Length; i++)
            multiplier[i] = -Math.Clamp(pulse.Efficiency + lanes.InversionEfficiencyOffset[i], 0, 1);
    }

    private static void Spectral(
        RfPulse pulse, double detune, PredictionSetting setting, PeakLanes peaks, Span<double> multiplier, Span<double> recovery)
    {
        var lanes = peaks.Lanes;
        var ideal = setting.Pulses == PulseModelling.Ideal || pulse is EfficiencyInversion or HardPulse { Duration: 0 };
        if (!ideal)
        {
            var response = new SpectralResponse(pulse, detune, setting.FieldStrength);
            var frequencies = new double[lanes.Count];
            for (var i = 0; i < frequencies.Length; i++)
                frequencies[i] = response.FrequencyOf(peaks.ShiftPpm?[i] ?? Shift(lanes.IsFat[i]), lanes.OffResonanceHz[i]);
            PulseResponse.Longitudinal(pulse, lanes.B1Scale, frequencies, lanes.T1, lanes.T2, multiplier, recovery);
            return;
        }

        // An ideal spectral pulse acts on all of fat and on nothing else.
        if (pulse is EfficiencyInversion efficiency)
            Efficiency(efficiency, lanes, multiplier);
        else
            Rotate(FlipAngle(pulse) ?? 180, lanes.B1Scale, multiplier);
        for (var i = 0; i < multiplier.Length; i++)
            if (!lanes.IsFat[i])
                multiplier[i] = 1;
    }

    private static void Rotate(double angle, double[] b1Scale, Span<double> multiplier)
    {
        for (var i = 0; i < multiplier.Length; i++)
            multiplier[i] = Kernels.Elementary.Cos(angle * (Math.PI / 180) * b1Scale[i]);
    }

    private static double[] Frequencies(PredictionSetting setting, PeakLanes peaks)
    {
        var lanes = peaks.Lanes;
        var frequencies = new double[lanes.Count];
        for (var i = 0; i < frequencies.Length; i++)
            frequencies[i] = lanes.OffResonanceHz[i]
                + Observables.Proton.ShiftHz(peaks.ShiftPpm?[i] ?? Shift(lanes.IsFat[i]), setting.FieldStrength);
        return frequencies;
    }

    private static double Shift(bool isFat) => isFat ? FatSpectrum.CarrierPpm : 0;

    private static double? FlipAngle(RfPulse pulse) => pulse switch
    {
        HardPulse hard => hard.FlipAngle,
        WindowedSincPulse sinc => sinc.FlipAngle,
        GaussianPulse gaussian => gaussian.FlipAngle,
        _ => null,
    };
}
