namespace ProtoLedger.Physics.Observables;

/// <summary>Contrast of a pair of tissues; an expectation says which of the two it means.</summary>
public static class Contrast
{
    /// <summary>|first| − |second|, in the unit of the signals; positive where the first tissue is brighter in a magnitude image.</summary>
    /// <param name="first">Signal, signed or magnitude.</param>
    /// <param name="second">Signal, signed or magnitude.</param>
    public static double Difference(double first, double second) => Math.Abs(first) - Math.Abs(second);

    /// <summary>|first| / |second|, no unit; infinite where the second tissue has no signal but the first has, 1 where both have none.</summary>
    /// <param name="first">Signal, signed or magnitude.</param>
    /// <param name="second">Signal, signed or magnitude.</param>
    public static double Ratio(double first, double second) => first == 0 && second == 0 ? 1 : Math.Abs(first) / Math.Abs(second);
}
