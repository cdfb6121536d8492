using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>Collects what the checks find.</summary>
internal sealed class Findings
{
    public static readonly IReadOnlyDictionary<long, SignatureVerdict> NoSignatures = new Dictionary<long, SignatureVerdict>();

    private readonly List<BundleFault> faults = [];
    private readonly List<string> holds = [];
    private readonly List<string> unknown = [];
    private readonly SortedDictionary<long, SignatureVerdict> signatures = [];
    private bool originUnknown;

    public void Wrong(BundlePart part, string entry, string detail) => faults.Add(new BundleFault(part, entry, detail));

    public void Holds(string words) => holds.Add(words);

    public void Unknown(string words) => unknown.Add(words);

    public void OriginUnknown(string words)
    {
        originUnknown = true;
        unknown.Add(words);
    }

    public void Signature(long leafIndex, SignatureVerdict verdict)
    {
        signatures[leafIndex] = verdict;
        if (verdict is SignatureVerdict.Good)
        {
            holds.Add(verdict.Words);
        }
        else
        {
            Wrong(BundlePart.Signature, BundleNames.InSignature(leafIndex, BundleNames.SignatureFile), verdict.Words);
        }
    }

    public BundleReport Report() => new(
        faults.Count > 0 ? BundleOutcome.Bad : originUnknown ? BundleOutcome.OriginUnknown : BundleOutcome.Good,
        faults, holds, unknown, signatures);
}
