namespace ProtoLedger.Ledger.Proofs;

/// <summary>Outcome of checking a proof. Both sides of a mismatch are kept.</summary>
public abstract record Verification
{
    private Verification()
    {
    }

    /// <summary>True only for <see cref="Valid"/>.</summary>
    public bool Holds => this is Valid;

    /// <summary>The proof holds.</summary>
    public sealed record Valid : Verification;

    /// <summary>The path leads to another root than the one given (for consistency: the later root).</summary>
    public sealed record RootMismatch(Digest Expected, Digest Computed) : Verification;

    /// <summary>The path leads to another earlier root than the one given.</summary>
    public sealed record EarlierRootMismatch(Digest Expected, Digest Computed) : Verification;

    /// <summary>The path has a wrong number of hashes for these sizes.</summary>
    public sealed record WrongLength(int Expected, int Actual) : Verification;

    /// <summary>A number is outside the tree.</summary>
    /// <param name="Name">index, size, from or to.</param>
    /// <param name="Value">As given.</param>
    /// <param name="Limit">What it had to be, in words.</param>
    public sealed record OutOfRange(string Name, long Value, string Limit) : Verification;
}
