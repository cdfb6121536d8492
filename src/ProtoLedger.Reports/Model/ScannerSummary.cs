namespace ProtoLedger.Reports.Model;

/// <summary>One scanner that runs the document.</summary>
/// <param name="ScannerId">Identifier.</param>
/// <param name="Title">As staff call it.</param>
/// <param name="MagneticFieldStrength">T.</param>
/// <param name="Location">Unit or room.</param>
/// <param name="NewlyFails">Expectations that newly fail there.</param>
/// <param name="NewlyUncertain">Expectations that held and cannot be told any more.</param>
/// <param name="StillFails">Expectations that failed before and now.</param>
/// <param name="NewlyHolds">Expectations that newly hold.</param>
/// <param name="StillHolds">Expectations that hold before and now.</param>
/// <param name="WrittenExpectations">Expectations written for it; 0 is said in the report.</param>
/// <param name="SlicesFit">False where the slices no longer fit in the repetition time.</param>
public sealed record ScannerSummary(
    string ScannerId,
    string Title,
    double MagneticFieldStrength,
    string Location,
    int NewlyFails,
    int NewlyUncertain,
    int StillFails,
    int NewlyHolds,
    int StillHolds,
    int WrittenExpectations,
    bool SlicesFit);

/// <summary>A protocol that was not edited along.</summary>
/// <param name="ProtocolId">Identifier.</param>
/// <param name="Title">Title.</param>
/// <param name="Version">Its newest effective version.</param>
/// <param name="Why">How it belongs to the document, such as "variant of brain-standard"; and what it keeps, such as "keeps RepetitionTime 9000 ms".</param>
public sealed record UnchangedVariant(string ProtocolId, string Title, int Version, string Why);
