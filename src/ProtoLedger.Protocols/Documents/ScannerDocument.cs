using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Protocols.Documents;

/// <summary>One scanner: field, pulses, limits and the wording of its console.</summary>
/// <param name="Id">Identifier.</param>
/// <param name="Title">As staff call it.</param>
/// <param name="Note">Free prose.</param>
/// <param name="MagneticFieldStrength">T, in (0, 10].</param>
/// <param name="Location">Unit or room.</param>
/// <param name="Pulses">Name → pulse: inversion, saturation, excitation and refocusing pulses it plays.</param>
/// <param name="Limits">What it can do.</param>
/// <param name="ConsoleWording">Parameter name → wording and meaning at this console.</param>
public sealed record ScannerDocument(
    string Id,
    string Title,
    string? Note,
    double MagneticFieldStrength,
    string Location,
    IReadOnlyDictionary<string, RfPulse> Pulses,
    ScannerLimits Limits,
    IReadOnlyDictionary<string, ConsoleWord> ConsoleWording) : LedgerDocument(Id, Title, Note)
{
    /// <inheritdoc/>
    public override DocumentKind Kind => DocumentKind.Scanner;
}

/// <summary>Limits of a scanner.</summary>
/// <param name="MinimumEchoSpacing">ms.</param>
/// <param name="MaximumGradient">mT/m.</param>
/// <param name="MaximumB1Hz">γB1/2π, Hz.</param>
public sealed record ScannerLimits(double MinimumEchoSpacing, double MaximumGradient, double MaximumB1Hz);

/// <summary>How a console words a parameter.</summary>
/// <param name="Word">What the console shows.</param>
/// <param name="Meaning">What is meant where the trade is ambiguous, or null.</param>
public sealed record ConsoleWord(string Word, string? Meaning);
