namespace ProtoLedger.Application.Site;

/// <summary>What makes one installation different from another.</summary>
/// <param name="Name">Name of the site, as its certificates show it.</param>
/// <param name="Origin">Origin line of its checkpoints, such as <c>protoledger.example.org/log</c>; no white space, no plus sign.</param>
/// <param name="SealingKey">32 bytes, kept outside the database, under which the site's own private keys are sealed.</param>
public sealed record SiteOptions(string Name, string Origin, byte[] SealingKey)
{
    /// <summary>Name of a site that gave itself none.</summary>
    public const string UsualName = "ProtoLedger site";

    /// <summary>Origin of a site that gave itself none.</summary>
    public const string UsualOrigin = "protoledger.invalid/ledger";
}
