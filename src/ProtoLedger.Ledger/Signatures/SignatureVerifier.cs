using System.Collections.Concurrent;
using System.Security.Cryptography.X509Certificates;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>Checks signatures against the site's authority, offline. Time never comes from a clock but from the manifest.</summary>
/// <param name="authority">The trusted authority's certificate.</param>
/// <param name="revocations">
/// Its revocation list, made at or after every signature that is checked; or null, and then revocation is not checked at all,
/// which a caller has to say.
/// </param>
public sealed class SignatureVerifier(SigningCertificate authority, RevocationList? revocations)
{
    // Checked once for all signatures: a bundle has thousands of them by a few people.
    private readonly Lazy<bool> authoritySignedItself = new(() => authority.IsSignedBy(authority));
    private readonly Lazy<bool> authoritySignedList = new(() => revocations is not null && revocations.IsSignedBy(authority));
    private readonly ConcurrentDictionary<Digest, bool> issued = new();
    private readonly ConcurrentDictionary<Digest, Parsed<SigningCertificate>> certificates = new();

    /// <summary>Checks one signature; the first fault found is the verdict.</summary>
    /// <param name="manifest">Bytes of manifest.json.</param>
    /// <param name="cms">Bytes of the .p7s file.</param>
    /// <param name="pinned">Certificate fingerprint that the ledger holds for this signature.</param>
    public SignatureVerdict Verify(ReadOnlySpan<byte> manifest, ReadOnlySpan<byte> cms, Digest pinned)
    {
        var (file, refusal) = SignatureFile.Read(cms.ToArray(), certificates);
        if (file is null)
        {
            return refusal!;
        }

        if (Digest.Of(manifest) is var actual && actual != file.ContentDigest)
        {
            return new SignatureVerdict.ContentChanged(file.ContentDigest, actual);
        }

        return SignatureManifest.Parse(manifest) switch
        {
            Parsed<SignatureManifest>.Bad(var reason) => new SignatureVerdict.ManifestMalformed(reason),
            var good => Verify(file, good.Require(), pinned),
        };
    }

    private SignatureVerdict Verify(SignatureFile file, SignatureManifest content, Digest pinned) =>
        AuthorityFault(content.Time)
        ?? RevocationListFault(content.Time)
        ?? CertificateFault(file.Certificate, content.Time)
        ?? SignatureFault(file, content, pinned)
        ?? new SignatureVerdict.Good(content, file.Certificate);

    private SignatureVerdict.AuthorityUnusable? AuthorityFault(DateTimeOffset at) =>
        !authority.IsAuthority ? new SignatureVerdict.AuthorityUnusable("it is no authority (basicConstraints)")
        : authority.KeyUsage is not { } usage || !usage.HasFlag(X509KeyUsageFlags.KeyCertSign) || !usage.HasFlag(X509KeyUsageFlags.CrlSign)
            ? new SignatureVerdict.AuthorityUnusable("its key usage lacks signing certificates and revocation lists")
        : !authority.HasP256Key() ? new SignatureVerdict.AuthorityUnusable("its key is not P-256")
        : !authoritySignedItself.Value ? new SignatureVerdict.AuthorityUnusable("it is not signed by itself")
        : at < authority.NotBefore || WholeSecond(at) > authority.NotAfter
            ? new SignatureVerdict.AuthorityUnusable($"it is valid from {authority.NotBefore:u} to {authority.NotAfter:u}, the signature is of {at:u}")
        : null;

    private SignatureVerdict.RevocationListUnusable? RevocationListFault(DateTimeOffset at) =>
        revocations is null ? null
        : !authoritySignedList.Value ? new SignatureVerdict.RevocationListUnusable("the trusted authority did not sign it")
        : revocations.ThisUpdate < WholeSecond(at)
            ? new SignatureVerdict.RevocationListUnusable($"it is of {revocations.ThisUpdate:u}, older than the signature of {at:u}")
        : null;

    private SignatureVerdict? CertificateFault(SigningCertificate certificate, DateTimeOffset at) =>
        !certificate.IssuerName.AsSpan().SequenceEqual(authority.SubjectName) ? new SignatureVerdict.ForeignAuthority(certificate.IssuerText)
        : certificate.SignatureAlgorithm != Oids.EcdsaWithSha256 || certificate.InnerSignatureAlgorithm != Oids.EcdsaWithSha256
            ? new SignatureVerdict.WeakAlgorithm("the signer's certificate", certificate.SignatureAlgorithm)
        : !issued.GetOrAdd(certificate.Fingerprint, _ => certificate.IsSignedBy(authority)) ? new SignatureVerdict.CertificateForged()
        : !certificate.HasP256Key() ? new SignatureVerdict.WeakAlgorithm("the signer's key", "another key than P-256")
        : certificate.IsAuthority ? new SignatureVerdict.WrongUsage("it is an authority")
        : certificate.KeyUsage is not { } usage || !usage.HasFlag(X509KeyUsageFlags.DigitalSignature) || !usage.HasFlag(X509KeyUsageFlags.NonRepudiation)
            ? new SignatureVerdict.WrongUsage("its key usage lacks digital signature and non-repudiation")
        : !certificate.ExtendedKeyUsage.Contains(Oids.DocumentSigning) ? new SignatureVerdict.WrongUsage("its extended key usage lacks document signing")
        : certificate.UnknownCritical.Count > 0 ? new SignatureVerdict.WrongUsage($"its critical extension {certificate.UnknownCritical[0]} is not understood")
        : at < certificate.NotBefore ? new SignatureVerdict.CertificateNotYetValid(certificate.NotBefore, at)
        : WholeSecond(at) > certificate.NotAfter ? new SignatureVerdict.CertificateExpired(certificate.NotAfter, at)
        : Revocation(certificate) is { } revocation && revocation.Time <= at
            ? new SignatureVerdict.CertificateRevoked(revocation.Time, revocation.Reason, at)
        : null;

    private static SignatureVerdict? SignatureFault(SignatureFile file, SignatureManifest content, Digest pinned) =>
        file.Certificate.Fingerprint != pinned ? new SignatureVerdict.OtherCertificate(pinned, file.Certificate.Fingerprint)
        : content.Certificate != pinned ? new SignatureVerdict.OtherCertificate(content.Certificate, file.Certificate.Fingerprint)
        : content.Signer != file.Certificate.Subject ? new SignatureVerdict.OtherPerson(content.Signer, file.Certificate.Subject)
        : file.SigningTime != WholeSecond(content.Time) ? new SignatureVerdict.OtherTime(content.Time, file.SigningTime)
        : !file.Certificate.Verify(file.SignedAttributes(), file.Signature) ? new SignatureVerdict.SignatureWrong()
        : null;

    private Revocation? Revocation(SigningCertificate certificate) =>
        revocations?.Entries.Where(r => r.Serial == certificate.Serial).MinBy(r => r.Time);

    private static DateTimeOffset WholeSecond(DateTimeOffset time) => time.AddTicks(-(time.Ticks % TimeSpan.TicksPerSecond));
}
