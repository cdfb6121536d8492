namespace ProtoLedger.Ledger.Signatures;

/// <summary>Outcome of checking one signature: <see cref="Good"/>, or the first thing that is wrong, by name.</summary>
public abstract record SignatureVerdict
{
    private SignatureVerdict()
    {
    }

    /// <summary>One sentence for people.</summary>
    public abstract string Words { get; }

    /// <summary>The signature is good.</summary>
    public sealed record Good(SignatureManifest Manifest, SigningCertificate Certificate) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words =>
            $"{Manifest.Signer.DisplayName} ({Manifest.Role}) signed '{Manifest.Meaning.ToWords()}' for {Manifest.Subject} at {LedgerTime.Format(Manifest.Time)}";
    }

    /// <summary>The signature file is not the one DER encoding that this profile allows.</summary>
    public sealed record Malformed(string Detail) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signature file is malformed: {Detail}";
    }

    /// <summary>Not exactly one signer.</summary>
    public sealed record WrongSignerCount(int Count) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signature file has {Count} signers instead of one";
    }

    /// <summary>An algorithm that is not accepted.</summary>
    public sealed record WeakAlgorithm(string Where, string Algorithm) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"{Where} uses {Algorithm}, only ECDSA P-256 with SHA-256 is accepted";
    }

    /// <summary>The manifest is not canonical or not complete.</summary>
    public sealed record ManifestMalformed(string Detail) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"manifest.json is malformed: {Detail}";
    }

    /// <summary>The manifest is not the signed one.</summary>
    public sealed record ContentChanged(Digest Signed, Digest Actual) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"manifest.json has SHA-256 {Actual}, but {Signed} was signed";
    }

    /// <summary>The signature value does not fit the certificate's key.</summary>
    public sealed record SignatureWrong : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => "the signature value does not belong to the signer's key and this content";
    }

    /// <summary>Another certificate than the one that the ledger pins.</summary>
    public sealed record OtherCertificate(Digest Pinned, Digest Actual) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signer's certificate is {Actual}, but {Pinned} is pinned";
    }

    /// <summary>The embedded certificate cannot be read.</summary>
    public sealed record CertificateMalformed(string Detail) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signer's certificate is malformed: {Detail}";
    }

    /// <summary>Issued under another authority's name.</summary>
    public sealed record ForeignAuthority(string Issuer) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signer's certificate was issued by '{Issuer}', not by the trusted authority";
    }

    /// <summary>Carries the authority's name, but its key did not sign the certificate.</summary>
    public sealed record CertificateForged : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => "the signer's certificate names the trusted authority, but was not signed by its key";
    }

    /// <summary>Signed after the certificate ended.</summary>
    public sealed record CertificateExpired(DateTimeOffset NotAfter, DateTimeOffset SignedAt) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signer's certificate had ended at {NotAfter:u}, the signature is of {SignedAt:u}";
    }

    /// <summary>Signed before the certificate began.</summary>
    public sealed record CertificateNotYetValid(DateTimeOffset NotBefore, DateTimeOffset SignedAt) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signer's certificate begins at {NotBefore:u}, the signature is of {SignedAt:u}";
    }

    /// <summary>Signed at or after the revocation.</summary>
    public sealed record CertificateRevoked(DateTimeOffset RevokedAt, RevocationReason Reason, DateTimeOffset SignedAt) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signer's certificate was revoked at {RevokedAt:u} ({Reason}), the signature is of {SignedAt:u}";
    }

    /// <summary>The certificate is not for signing documents.</summary>
    public sealed record WrongUsage(string Detail) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signer's certificate is not for signing approvals: {Detail}";
    }

    /// <summary>The trusted certificate cannot act as an authority.</summary>
    public sealed record AuthorityUnusable(string Detail) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the trusted certificate cannot act as an authority: {Detail}";
    }

    /// <summary>The revocation list does not help.</summary>
    public sealed record RevocationListUnusable(string Detail) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the revocation list cannot be used: {Detail}";
    }

    /// <summary>Manifest and certificate name different people.</summary>
    public sealed record OtherPerson(Person Manifest, Person Certificate) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the manifest names {Manifest.Account} ({Manifest.DisplayName}), the certificate {Certificate.Account} ({Certificate.DisplayName})";
    }

    /// <summary>Manifest and signed attribute name different times.</summary>
    public sealed record OtherTime(DateTimeOffset Manifest, DateTimeOffset Attribute) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the manifest is of {Manifest:u}, the signed attribute of {Attribute:u}";
    }

    /// <summary>A good signature that was made for something else.</summary>
    public sealed record BoundToOther(string Field, string Expected, string Actual) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"the signature was given for another {Field}: '{Actual}' instead of '{Expected}'";
    }

    /// <summary>A file is not the signed one.</summary>
    public sealed record ArtefactChanged(string Name, Digest Signed, Digest Actual) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"{Name} has SHA-256 {Actual}, but {Signed} was signed";
    }

    /// <summary>A file is not covered by the signature.</summary>
    public sealed record ArtefactNotSigned(string Name) : SignatureVerdict
    {
        /// <inheritdoc/>
        public override string Words => $"{Name} is not among the signed files";
    }
}
