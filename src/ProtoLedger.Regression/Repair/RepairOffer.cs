using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Repair;

/// <summary>The smallest change found that makes a broken expectation hold.</summary>
/// <param name="ExpectationId">The expectation.</param>
/// <param name="Series">Series that is changed.</param>
/// <param name="Settings">Parameters with their new values.</param>
/// <param name="Proposal">The protocol with them.</param>
/// <param name="Outcome">What the prediction says about the expectation then.</param>
/// <param name="Cost">What happens to every other observable and expectation, against the protocol that is repaired.</param>
/// <param name="Sentence">The offer in words.</param>
public sealed record RepairOffer(
    string ExpectationId,
    string Series,
    IReadOnlyList<RepairSetting> Settings,
    ProtocolDocument Proposal,
    ExpectationOutcome Outcome,
    RunDifference Cost,
    string Sentence);

/// <summary>One parameter set to a new value.</summary>
/// <param name="Pointer">JSON pointer below the series, such as <c>/preparations/0/InversionTime</c>.</param>
/// <param name="Old">In the parameter's unit.</param>
/// <param name="New">In the parameter's unit.</param>
public sealed record RepairSetting(string Pointer, double Old, double New);

/// <summary>A parameter that a repair may change, and its limits.</summary>
/// <param name="Pointer">JSON pointer below the series.</param>
/// <param name="Low">Lowest value allowed.</param>
/// <param name="High">Highest value allowed.</param>
/// <param name="Step">Step of the console in the parameter's unit, &gt; 0.</param>
public sealed record RepairParameter(string Pointer, double Low, double High, double Step);
