namespace ProtoLedger.Ledger.Audit;

/// <summary>One record that is not what it has to be.</summary>
/// <param name="Record">Which: "leaf 17", "node level 2 index 4", "checkpoint of 20 facts", "content 1a2b…".</param>
/// <param name="Detail">What is wrong, both sides stated.</param>
public sealed record AuditFault(string Record, string Detail)
{
    /// <summary>One line.</summary>
    public string Words => $"{Record}: {Detail}";
}

/// <summary>What an audit found.</summary>
/// <param name="Size">Leaves read.</param>
/// <param name="Root">Root recomputed from them.</param>
/// <param name="Faults">At most <see cref="MostFaults"/>, leaves first, in order; the first is the first record that differs.</param>
/// <param name="Holds">What was shown to hold, in words.</param>
/// <param name="Unknown">What cannot be known from what was given, in words.</param>
public sealed record AuditReport(
    long Size, Digest Root, IReadOnlyList<AuditFault> Faults, IReadOnlyList<string> Holds, IReadOnlyList<string> Unknown)
{
    /// <summary>Further faults are counted in the last entry, but not listed.</summary>
    public const int MostFaults = 100;

    /// <summary>True if nothing is wrong.</summary>
    public bool Clean => Faults.Count == 0;

    /// <summary>The first record that differs, or null.</summary>
    public AuditFault? First => Faults.Count > 0 ? Faults[0] : null;
}
