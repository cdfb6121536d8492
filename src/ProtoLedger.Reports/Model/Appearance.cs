namespace ProtoLedger.Reports.Model;

/// <summary>What is needed to draw the predicted pictures before, after and their difference.</summary>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesTitle">Series.</param>
/// <param name="Condition">Title of the B0/B1 condition.</param>
/// <param name="Phantom">Which digital phantom.</param>
/// <param name="Tissues">Predicted signed signal of the phantom's tissues; for tissues of the phantom that are missing here the nearest is drawn and named, or black.</param>
/// <param name="NoiseBefore">Standard deviation of the noise over the brightest tissue's signal before, ≥ 0.</param>
/// <param name="NoiseAfter">The same scale, after.</param>
/// <param name="B1Shading">Depth of the transmit-field shading: B1+ scale falls from 1 + depth at the centre to 1 − depth at the edge; in [0, 0.5].</param>
/// <param name="BlurBefore">Width of the point-spread function along the phase direction, pixels, ≥ 1.</param>
/// <param name="BlurAfter">After.</param>
/// <param name="PhaseAlongRows">True where the phase direction is left to right in the picture.</param>
public sealed record Appearance(
    string ScannerId,
    string SeriesTitle,
    string Condition,
    PhantomKind Phantom,
    IReadOnlyList<TissueSignal> Tissues,
    double NoiseBefore,
    double NoiseAfter,
    double B1Shading,
    double BlurBefore,
    double BlurAfter,
    bool PhaseAlongRows);

/// <summary>Predicted signed signals of one tissue.</summary>
/// <param name="Tissue">Catalogue name.</param>
/// <param name="Words">In plain words.</param>
/// <param name="Before">At the nominal field, base version.</param>
/// <param name="After">At the nominal field, proposal.</param>
/// <param name="BeforeOffResonance">In the off-resonance region, base version.</param>
/// <param name="AfterOffResonance">In the off-resonance region, proposal.</param>
/// <param name="B1Slope">Relative change of the signal per relative change of the B1+ scale; 0 where it does not depend on it.</param>
public sealed record TissueSignal(
    string Tissue,
    string Words,
    double Before,
    double After,
    double BeforeOffResonance,
    double AfterOffResonance,
    double B1Slope);

/// <summary>The digital phantoms.</summary>
public enum PhantomKind
{
    /// <summary>Head, axial, at the height of the lateral ventricles.</summary>
    Head,

    /// <summary>Knee, sagittal.</summary>
    Knee,

    /// <summary>Upper abdomen, axial.</summary>
    Abdomen,
}
