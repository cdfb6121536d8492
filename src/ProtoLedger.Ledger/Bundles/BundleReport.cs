using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>Outcome of verifying a bundle; the numbers are the exit codes of the command.</summary>
public enum BundleOutcome
{
    /// <summary>Everything holds and comes from a trusted site.</summary>
    Good = 0,

    /// <summary>Something is wrong.</summary>
    Bad = 1,

    /// <summary>The question was wrong: a trust file or outside checkpoint cannot be read.</summary>
    Usage = 2,

    /// <summary>Consistent in itself, but nothing from outside says where it comes from.</summary>
    OriginUnknown = 3,
}

/// <summary>What verification found.</summary>
/// <param name="Outcome">Overall.</param>
/// <param name="Faults">Everything that is wrong; empty unless the outcome is bad or usage.</param>
/// <param name="Holds">What was shown to hold, in words.</param>
/// <param name="Unknown">What cannot be known from what was given, in words.</param>
/// <param name="Signatures">Verdict on each signature, by the index of its leaf.</param>
public sealed record BundleReport(
    BundleOutcome Outcome, IReadOnlyList<BundleFault> Faults, IReadOnlyList<string> Holds, IReadOnlyList<string> Unknown,
    IReadOnlyDictionary<long, SignatureVerdict> Signatures)
{
    /// <summary>0 good, 1 bad, 2 usage, 3 consistent but origin unknown.</summary>
    public int ExitCode => (int)Outcome;

    /// <summary>The whole report as lines for people.</summary>
    public IEnumerable<string> Lines()
    {
        yield return Outcome switch
        {
            BundleOutcome.Good => "GOOD: everything in this bundle verifies and comes from the trusted site.",
            BundleOutcome.OriginUnknown => "CONSISTENT, ORIGIN UNKNOWN: the bundle fits together, but nothing you gave says who made it.",
            BundleOutcome.Usage => "CANNOT CHECK: what was given beside the bundle cannot be used.",
            _ => "BAD: this bundle must not be relied on.",
        };
        foreach (var fault in Faults)
        {
            yield return $"  wrong:   {fault.Words}";
        }

        foreach (var words in Holds)
        {
            yield return $"  holds:   {words}";
        }

        foreach (var words in Unknown)
        {
            yield return $"  unknown: {words}";
        }
    }
}
