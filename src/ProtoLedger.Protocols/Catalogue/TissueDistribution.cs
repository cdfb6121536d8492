using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Catalogue;

/// <summary>A tissue at one field strength with the spread of each value.</summary>
/// <param name="Mean">The mean values.</param>
/// <param name="Title">As a report says it.</param>
/// <param name="T1Sd">Standard deviation of T1, ms.</param>
/// <param name="T2Sd">Standard deviation of T2, ms.</param>
/// <param name="T2StarSd">Standard deviation of T2*, ms; null where T2* is unknown.</param>
/// <param name="ProtonDensitySd">Standard deviation of the relative proton density.</param>
/// <param name="ApparentDiffusionCoefficientSd">Standard deviation, 10⁻³ mm²/s; null where it is unknown.</param>
/// <param name="Weakest">The weakest evidence behind T1, T2 and proton density; a mark is shown where it is not <see cref="Evidence.Seen"/>.</param>
public sealed record TissueDistribution(
    Tissue Mean,
    string Title,
    double T1Sd,
    double T2Sd,
    double? T2StarSd,
    double ProtonDensitySd,
    double? ApparentDiffusionCoefficientSd,
    Evidence Weakest);
