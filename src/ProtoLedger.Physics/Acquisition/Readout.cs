namespace ProtoLedger.Physics.Acquisition;

/// <summary>What samples the echo. Keywords are those of DICOM, in the standard's units (ms, degrees).</summary>
/// <param name="RepetitionTime">ms, &gt; 0: from the first pulse of a period (preparations included) to the first pulse of the next.</param>
/// <param name="EchoTime">Effective echo time, ms, ≥ 0.</param>
/// <param name="ExcitationFlipAngle">Degrees, in (0, 180].</param>
public abstract record Readout(double RepetitionTime, double EchoTime, double ExcitationFlipAngle);

/// <summary>Single spin echo; the refocusing pulse stands at half the echo time.</summary>
/// <param name="RepetitionTime">ms.</param>
/// <param name="EchoTime">ms, &gt; 0.</param>
/// <param name="ExcitationFlipAngle">Degrees.</param>
/// <param name="RefocusingFlipAngle">Degrees, in (0, 180].</param>
public sealed record SpinEcho(double RepetitionTime, double EchoTime, double ExcitationFlipAngle, double RefocusingFlipAngle)
    : Readout(RepetitionTime, EchoTime, ExcitationFlipAngle);

/// <summary>Train of spin echoes under the conditions of Carr, Purcell, Meiboom and Gill.</summary>
/// <param name="RepetitionTime">ms.</param>
/// <param name="EchoTime">Effective: time of the echo that fills the centre of k-space, ms; a multiple of <paramref name="EchoSpacing"/>.</param>
/// <param name="ExcitationFlipAngle">Degrees.</param>
/// <param name="EchoSpacing">ms, &gt; 0.</param>
/// <param name="EchoTrainLength">Number of echoes, ≥ 1.</param>
/// <param name="RefocusingFlipAngles">Nominal angles in order, degrees; one value stands for all, otherwise as many as echoes.</param>
/// <param name="FlipBackAngle">Angle of a pulse at the last echo, degrees, null for none; −90 returns what is left to +z.</param>
public sealed record EchoTrain(
    double RepetitionTime,
    double EchoTime,
    double ExcitationFlipAngle,
    double EchoSpacing,
    int EchoTrainLength,
    IReadOnlyList<double> RefocusingFlipAngles,
    double? FlipBackAngle = null) : Readout(RepetitionTime, EchoTime, ExcitationFlipAngle);

/// <summary>Spoiled gradient echo.</summary>
/// <param name="RepetitionTime">ms.</param>
/// <param name="EchoTime">Of the first echo, ms.</param>
/// <param name="ExcitationFlipAngle">Degrees.</param>
/// <param name="FurtherEchoTimes">Echo times after the first, for opposed-phase and Dixon series, ms; empty for one echo.</param>
/// <param name="SpoilingIncrement">Phase increment of RF spoiling, degrees; null for ideal spoiling.</param>
public sealed record SpoiledGradientEcho(
    double RepetitionTime,
    double EchoTime,
    double ExcitationFlipAngle,
    IReadOnlyList<double> FurtherEchoTimes,
    double? SpoilingIncrement = null) : Readout(RepetitionTime, EchoTime, ExcitationFlipAngle);

/// <summary>Balanced gradient echo with alternating RF phase.</summary>
/// <param name="RepetitionTime">ms.</param>
/// <param name="EchoTime">ms; usually half the repetition time.</param>
/// <param name="ExcitationFlipAngle">Degrees.</param>
public sealed record BalancedGradientEcho(double RepetitionTime, double EchoTime, double ExcitationFlipAngle)
    : Readout(RepetitionTime, EchoTime, ExcitationFlipAngle);

/// <summary>Train of spoiled gradient echoes after a preparation; the repetition time is that of the whole cycle.</summary>
/// <param name="RepetitionTime">Of the cycle, ms.</param>
/// <param name="EchoTime">After each excitation, ms.</param>
/// <param name="ExcitationFlipAngle">Degrees.</param>
/// <param name="ReadoutSpacing">From excitation to excitation in the train, ms, &gt; 0.</param>
/// <param name="ReadoutTrainLength">Number of excitations, ≥ 1.</param>
/// <param name="Order">Which excitation fills the centre of k-space.</param>
public sealed record SpoiledGradientEchoTrain(
    double RepetitionTime,
    double EchoTime,
    double ExcitationFlipAngle,
    double ReadoutSpacing,
    int ReadoutTrainLength,
    EncodingOrder Order) : Readout(RepetitionTime, EchoTime, ExcitationFlipAngle)
{
    /// <summary>Number, from 0, of the excitation that fills the centre of k-space.</summary>
    public int CentreIndex => Order == EncodingOrder.Centric ? 0 : ReadoutTrainLength / 2;
}

/// <summary>Order in which a train fills k-space.</summary>
public enum EncodingOrder
{
    /// <summary>From one edge to the other: the middle of the train is the centre.</summary>
    Linear,

    /// <summary>From the centre outwards: the first of the train is the centre.</summary>
    Centric,
}

/// <summary>Diffusion-weighted spin echo.</summary>
/// <param name="RepetitionTime">ms.</param>
/// <param name="EchoTime">ms.</param>
/// <param name="ExcitationFlipAngle">Degrees.</param>
/// <param name="RefocusingFlipAngle">Degrees.</param>
/// <param name="DiffusionBValue">s/mm², ≥ 0.</param>
public sealed record DiffusionSpinEcho(
    double RepetitionTime, double EchoTime, double ExcitationFlipAngle, double RefocusingFlipAngle, double DiffusionBValue)
    : Readout(RepetitionTime, EchoTime, ExcitationFlipAngle);
