using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Application.Predictions;

/// <summary>A series, and what to predict it for. Nothing of it needs to be stored.</summary>
/// <param name="Series">The series, read and validated.</param>
/// <param name="Tissues">At least one.</param>
/// <param name="Conditions">At least one field point.</param>
/// <param name="Setting">Field strength and treatment of pulses.</param>
/// <param name="AgeGroup">Age group of the tissues that are named.</param>
public sealed record PredictionQuestion(
    Series Series, IReadOnlyList<TissueChoice> Tissues, IReadOnlyList<FieldPoint> Conditions, PredictionSetting Setting, string AgeGroup = "adult");

/// <summary>A tissue of a question.</summary>
/// <param name="Pointer">JSON pointer of the tissue in the request, for errors.</param>
public abstract record TissueChoice(string Pointer)
{
    /// <summary>A tissue of the catalogue.</summary>
    /// <param name="Name">Its name.</param>
    /// <param name="Pointer">JSON pointer of the tissue in the request.</param>
    public sealed record Named(string Name, string Pointer) : TissueChoice(Pointer);

    /// <summary>A tissue whose values the caller gives.</summary>
    /// <param name="Tissue">The values.</param>
    /// <param name="Pointer">JSON pointer of the tissue in the request.</param>
    public sealed record Given(Tissue Tissue, string Pointer) : TissueChoice(Pointer);
}

/// <summary>Predicted signals of a question.</summary>
/// <param name="ModelId">The model that computed them.</param>
/// <param name="Tissues">Tissues in the order asked, with the values used.</param>
/// <param name="Signals">Lane of tissue i and condition j is i · (number of conditions) + j.</param>
public sealed record PredictionAnswer(string ModelId, IReadOnlyList<Tissue> Tissues, SignalTable Signals);
