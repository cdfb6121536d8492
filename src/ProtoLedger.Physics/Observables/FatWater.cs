namespace ProtoLedger.Physics.Observables;

/// <summary>Displacement and phase of fat against water.</summary>
/// <remarks>Shifts are in ppm of fat from water, negative at lower frequency; −3.5 and −3.4 are both in use, so the caller states which.</remarks>
public static class FatWater
{
    /// <summary>Displacement along the readout, pixels, signed as the shift: Δf / (Hz per pixel). Derived.</summary>
    /// <param name="ppm">Chemical shift, ppm.</param>
    /// <param name="fieldStrength">B0, T.</param>
    /// <param name="pixelBandwidth">Hz per pixel, &gt; 0.</param>
    public static double ShiftPixels(double ppm, double fieldStrength, double pixelBandwidth) => Proton.ShiftHz(ppm, fieldStrength) / pixelBandwidth;

    /// <summary>Displacement of the excited slice, mm: Δf / bandwidth · thickness. Derived.</summary>
    /// <param name="ppm">Chemical shift, ppm.</param>
    /// <param name="fieldStrength">B0, T.</param>
    /// <param name="pulseBandwidthHz">Bandwidth of the selective pulse, Hz, &gt; 0.</param>
    /// <param name="sliceThickness">mm, &gt; 0.</param>
    public static double SliceShift(double ppm, double fieldStrength, double pulseBandwidthHz, double sliceThickness) =>
        Proton.ShiftHz(ppm, fieldStrength) / pulseBandwidthHz * sliceThickness;

    /// <summary>Phase of fat against water at a gradient echo, degrees in [−180, 180): ±180 is opposed phase, 0 in phase.</summary>
    /// <param name="ppm">Chemical shift, ppm.</param>
    /// <param name="fieldStrength">B0, T.</param>
    /// <param name="echoTime">ms.</param>
    public static double PhaseDegrees(double ppm, double fieldStrength, double echoTime)
    {
        var turns = Proton.ShiftHz(ppm, fieldStrength) * echoTime * 1e-3;
        return 360 * (turns - Math.Floor(turns + 0.5));
    }

    /// <summary>Echo time of the n-th opposed phase, ms: (n − ½)/|Δf|, n from 1. Source: Dixon, Radiology 1984;153:189 (from memory).</summary>
    public static double OpposedPhaseEchoTime(double ppm, double fieldStrength, int number = 1) =>
        (number - 0.5) * 1e3 / Math.Abs(Proton.ShiftHz(ppm, fieldStrength));

    /// <summary>Echo time of the n-th in phase, ms: n/|Δf|, n from 1. Source: Dixon, Radiology 1984;153:189 (from memory).</summary>
    public static double InPhaseEchoTime(double ppm, double fieldStrength, int number = 1) =>
        number * 1e3 / Math.Abs(Proton.ShiftHz(ppm, fieldStrength));
}
