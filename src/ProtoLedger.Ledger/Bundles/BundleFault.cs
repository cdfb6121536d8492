namespace ProtoLedger.Ledger.Bundles;

/// <summary>What in a bundle is bad.</summary>
/// <param name="Part">Kind of place.</param>
/// <param name="Entry">Name of the entry, or the place in words.</param>
/// <param name="Detail">What is wrong, in words.</param>
public sealed record BundleFault(BundlePart Part, string Entry, string Detail)
{
    /// <summary>One line.</summary>
    public string Words => $"{Entry}: {Detail}";
}

/// <summary>Kinds of places in a bundle.</summary>
public enum BundlePart
{
    /// <summary>The zip file itself.</summary>
    Container,

    /// <summary>The list of entries and its note.</summary>
    Index,

    /// <summary>The signed checkpoint.</summary>
    Checkpoint,

    /// <summary>A leaf of the ledger.</summary>
    Leaf,

    /// <summary>A content.</summary>
    Blob,

    /// <summary>A signature, its manifest or a signed file.</summary>
    Signature,

    /// <summary>The authority or its revocation list.</summary>
    Authority,

    /// <summary>The checkpoint that the reader holds from outside.</summary>
    OutsideCheckpoint,
}

/// <summary>Carries the first fault out of a reader.</summary>
internal sealed class BundleFaultException(BundleFault fault) : Exception(fault.Words)
{
    public BundleFault Fault { get; } = fault;
}
