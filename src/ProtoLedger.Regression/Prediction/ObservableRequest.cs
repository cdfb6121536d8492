using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Regression.Prediction;

/// <summary>An observable at one field point.</summary>
internal readonly record struct ObservableRequest(string Name, string? Tissue, string? Reference, FieldPoint Point);

/// <summary>An observable over the draws, or the reason why there is none.</summary>
/// <param name="Signed">One value for each draw; attribution adds up over these.</param>
/// <param name="Shown">One value for each draw, as documents limit it and pages show it: magnitudes where an image has them.</param>
/// <param name="Because">Null where there are values.</param>
internal sealed record ObservableValues(double[] Signed, double[] Shown, string? Because)
{
    internal static ObservableValues Of(double[] values) => new(values, values, null);

    internal static ObservableValues Missing(string because) => new([], [], because);
}
