namespace ProtoLedger.Reports.Model;

/// <summary>What the regression run counted.</summary>
/// <param name="Versions">Stored versions recomputed.</param>
/// <param name="Proposals">Proposals under review recomputed.</param>
/// <param name="Results">Results written.</param>
/// <param name="Shared">Results that shared one computation with an identical input.</param>
/// <param name="Moved">Versions whose prediction moved although their document did not.</param>
/// <param name="NewlyFailing">Expectations that newly fail.</param>
/// <param name="NewlyHolding">Expectations that newly hold.</param>
/// <param name="FailedShards">Parts of the run that could not be computed; 0 in a complete run.</param>
public sealed record ReportRun(
    int Versions, int Proposals, int Results, int Shared, int Moved, int NewlyFailing, int NewlyHolding, int FailedShards);

/// <summary>Another stored version whose prediction moved.</summary>
/// <param name="ProtocolId">Protocol.</param>
/// <param name="Title">Title.</param>
/// <param name="Version">Version number.</param>
/// <param name="ScannerId">Scanner.</param>
/// <param name="Effective">True where it is effective there now.</param>
/// <param name="Observable">Observable that moved most.</param>
/// <param name="Subject">Tissue in plain words, or null.</param>
/// <param name="Reference">Second tissue, or null.</param>
/// <param name="Before">Its value in the run before.</param>
/// <param name="After">Its value now.</param>
/// <param name="Unit">Unit, empty for ratios.</param>
/// <param name="NewlyFails">Expectations of that version that newly fail.</param>
public sealed record TouchedVersion(
    string ProtocolId,
    string Title,
    int Version,
    string ScannerId,
    bool Effective,
    string Observable,
    string? Subject,
    string? Reference,
    double Before,
    double After,
    string Unit,
    int NewlyFails);
