using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Repair;

/// <summary>Parameters that keep a chosen set of contrasts on another scanner.</summary>
/// <param name="Kept">True when every chosen contrast is within its tolerance.</param>
/// <param name="Settings">Series identifier → settings that differ from the original; empty where nothing need change or nothing was found.</param>
/// <param name="Proposal">The protocol with them; the nearest found when <paramref name="Kept"/> is false.</param>
/// <param name="Contrasts">Each chosen contrast: original, plain copy, with the settings.</param>
/// <param name="Sentence">The result in words, or the statement that no setting keeps them.</param>
public sealed record CarryOverResult(
    bool Kept,
    IReadOnlyDictionary<string, IReadOnlyList<RepairSetting>> Settings,
    ProtocolDocument Proposal,
    IReadOnlyList<CarriedContrast> Contrasts,
    string Sentence);

/// <summary>One contrast that is to be kept.</summary>
/// <param name="Observable">Which.</param>
/// <param name="Original">On the scanner of origin.</param>
/// <param name="Copied">On the target with unchanged parameters.</param>
/// <param name="Carried">On the target with the settings found.</param>
/// <param name="Tolerance">Greatest absolute difference that counts as kept.</param>
public sealed record CarriedContrast(ObservableKey Observable, double Original, double Copied, double Carried, double Tolerance);
