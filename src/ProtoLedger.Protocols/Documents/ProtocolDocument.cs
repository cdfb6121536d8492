using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Protocols.Documents;

/// <summary>A named set of series for one kind of exam.</summary>
/// <param name="Id">Identifier.</param>
/// <param name="Title">Name of the exam.</param>
/// <param name="Note">Free prose.</param>
/// <param name="BodyRegion">Region, as conditions documents name it.</param>
/// <param name="AgeGroup">Age group whose tissue values apply; the catalogue must hold it.</param>
/// <param name="VariantOf">Identifier of the protocol that this one is a variant of, or null.</param>
/// <param name="Scanners">Identifiers of the scanners that run it, at least one.</param>
/// <param name="Conditions">Identifier of the conditions document that applies.</param>
/// <param name="RequiredSignatures">Roles and meanings that an approval needs.</param>
/// <param name="Sheet">The text that staff read.</param>
/// <param name="Series">In the order in which they are run, at least one.</param>
public sealed record ProtocolDocument(
    string Id,
    string Title,
    string? Note,
    string BodyRegion,
    string AgeGroup,
    string? VariantOf,
    IReadOnlyList<string> Scanners,
    string Conditions,
    IReadOnlyList<RequiredSignature> RequiredSignatures,
    ProtocolSheet Sheet,
    IReadOnlyList<ProtocolSeries> Series) : LedgerDocument(Id, Title, Note)
{
    /// <inheritdoc/>
    public override DocumentKind Kind => DocumentKind.Protocol;
}

/// <summary>A role that must sign, and what its signature says.</summary>
/// <param name="Role">Role: technologist, lead-technologist, physicist, radiologist, reviewer or administrator.</param>
/// <param name="Meaning">authored, reviewed, approved, clinically-accepted or ready-to-load.</param>
/// <param name="Deputies">Account names that may sign in place of the role; may be empty.</param>
public sealed record RequiredSignature(string Role, string Meaning, IReadOnlyList<string> Deputies);

/// <summary>The sheet's text. Each field is versioned with the document and has its own provenance; null where it is not filled.</summary>
/// <param name="Indication">Why the exam is done.</param>
/// <param name="Coil">Receive coil.</param>
/// <param name="Positioning">How the patient lies.</param>
/// <param name="Coverage">What the stack covers.</param>
/// <param name="Landmarks">How the stack is angled.</param>
/// <param name="ContrastAgent">Agent with dose and delay, or null for none.</param>
/// <param name="Order">Order of the series and what may be dropped.</param>
/// <param name="Fallback">What to do when the patient cannot hold still or the scanner refuses.</param>
public sealed record ProtocolSheet(
    string? Indication,
    string? Coil,
    string? Positioning,
    string? Coverage,
    string? Landmarks,
    ContrastAgent? ContrastAgent,
    string? Order,
    string? Fallback);

/// <summary>Contrast agent by chemical class.</summary>
/// <param name="Agent">Chemical class, no trade name.</param>
/// <param name="DoseMillimolePerKilogram">mmol/kg, &gt; 0.</param>
/// <param name="DelaySeconds">From injection to the first series after it, s, ≥ 0.</param>
public sealed record ContrastAgent(string Agent, double DoseMillimolePerKilogram, double DelaySeconds);

/// <summary>One series of a protocol document.</summary>
/// <param name="Id">Unique within the protocol.</param>
/// <param name="Title">As the console and the sheet show it.</param>
/// <param name="Note">Free prose.</param>
/// <param name="Acquisition">What is played, pulses resolved by <see cref="PulseReference"/> names: see <c>SeriesMapping</c>.</param>
/// <param name="Meanings">Parameter name → what is meant, where the trade is ambiguous.</param>
/// <param name="AllowedRanges">Ranges within which the console may be changed without a change request.</param>
/// <param name="Recorded">Scanner id → values read at its console.</param>
/// <param name="ContrastConcentration">Concentration assumed in enhancing tissue, mmol/l; null before contrast.</param>
public sealed record ProtocolSeries(
    string Id,
    string Title,
    string? Note,
    Series Acquisition,
    IReadOnlyDictionary<string, string> Meanings,
    IReadOnlyList<AllowedRange> AllowedRanges,
    IReadOnlyDictionary<string, RecordedValues> Recorded,
    double? ContrastConcentration = null);

/// <summary>An inversion or saturation pulse referred to by name; the scanner's document says what it is.</summary>
/// <param name="Name">Name in the scanner's list of pulses, or a built-in: adiabatic, perfect.</param>
public sealed record PulseReference(string Name) : RfPulse(Name);

/// <summary>A range in which one parameter may be set at the console.</summary>
/// <param name="Parameter">JSON pointer below the series, such as <c>/readout/RepetitionTime</c>.</param>
/// <param name="Low">Lowest value, in the parameter's unit.</param>
/// <param name="High">Highest value.</param>
public sealed record AllowedRange(string Parameter, double Low, double High);

/// <summary>Values read at a console after the series was entered there.</summary>
/// <param name="ScanTimeSeconds">s, or null.</param>
/// <param name="HeadSarWattPerKilogram">W/kg as displayed, or null.</param>
/// <param name="WholeBodySarWattPerKilogram">W/kg as displayed, or null.</param>
/// <param name="B1RmsMicrotesla">µT as displayed, or null.</param>
/// <param name="MinimumEchoTime">ms as displayed, or null.</param>
public sealed record RecordedValues(
    double? ScanTimeSeconds,
    double? HeadSarWattPerKilogram,
    double? WholeBodySarWattPerKilogram,
    double? B1RmsMicrotesla,
    double? MinimumEchoTime);
