namespace ProtoLedger.Application.Stores;

/// <summary>Keys of the site and wrapped keys of people, with certificates and revocations.</summary>
public interface IKeyStore
{
    /// <summary>Keys of the site, or null before the first start.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<SiteKeyRow?> FindSiteKeyAsync(CancellationToken cancellationToken);

    /// <summary>Stores the keys of the site; false when they are there already.</summary>
    /// <param name="key">Keys.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<bool> AddSiteKeyAsync(SiteKeyRow key, CancellationToken cancellationToken);

    /// <summary>Stores a person's wrapped key and certificate; the newest one that is not revoked signs.</summary>
    /// <param name="key">Key.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddPersonKeyAsync(PersonKeyRow key, CancellationToken cancellationToken);

    /// <summary>Newest key of an account that is not revoked, or null.</summary>
    /// <param name="account">Account.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<PersonKeyRow?> FindPersonKeyAsync(string account, CancellationToken cancellationToken);

    /// <summary>The certificate with this hash, or null.</summary>
    /// <param name="sha256">Hash of the certificate's bytes.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<PersonKeyRow?> FindCertificateAsync(byte[] sha256, CancellationToken cancellationToken);

    /// <summary>Records a revocation.</summary>
    /// <param name="revocation">Which, when, why.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddRevocationAsync(RevocationRow revocation, CancellationToken cancellationToken);

    /// <summary>All revocations, oldest first.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<RevocationRow>> RevocationsAsync(CancellationToken cancellationToken);
}

/// <summary>The site's own keys, each sealed under the server's key-encryption key.</summary>
/// <param name="CaCertificate">The authority's certificate, DER.</param>
/// <param name="CaKeySealed">The authority's private key, sealed.</param>
/// <param name="NoteKeySealed">The checkpoints' Ed25519 private key, sealed.</param>
/// <param name="NoteVerifier">Verifier key line of the checkpoints.</param>
/// <param name="Origin">Origin line of the checkpoints.</param>
/// <param name="CreatedAt">UTC.</param>
public sealed record SiteKeyRow(byte[] CaCertificate, byte[] CaKeySealed, byte[] NoteKeySealed, string NoteVerifier, string Origin, DateTime CreatedAt);

/// <summary>A person's signing key, wrapped under their passphrase.</summary>
/// <param name="CertificateSha256">Hash of the certificate.</param>
/// <param name="Account">Owner.</param>
/// <param name="Certificate">DER.</param>
/// <param name="WrappedKey">Private key under the passphrase, with the parameters of the wrapping.</param>
/// <param name="EnrolledBy">Account of the person who checked the identity.</param>
/// <param name="CreatedAt">UTC.</param>
public sealed record PersonKeyRow(
    byte[] CertificateSha256, string Account, byte[] Certificate, byte[] WrappedKey, string EnrolledBy, DateTime CreatedAt);

/// <summary>A revoked certificate: signatures made before stay good.</summary>
/// <param name="CertificateSha256">Hash.</param>
/// <param name="RevokedAt">UTC.</param>
/// <param name="RevokedBy">Account.</param>
/// <param name="Reason">Why.</param>
public sealed record RevocationRow(byte[] CertificateSha256, DateTime RevokedAt, string RevokedBy, string Reason);
