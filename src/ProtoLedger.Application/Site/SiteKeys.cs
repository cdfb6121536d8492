using System.Security.Cryptography;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Application.Site;

/// <summary>The site's authority and the key of its checkpoints, opened once for each process.</summary>
public sealed class SiteKeys : IDisposable
{
    private const string AuthorityPurpose = "site authority";
    private const string NotePurpose = "checkpoint key";
    private readonly SiteOptions options;
    private readonly TimeProvider clock;
    private volatile Opened? opened;

    /// <summary>For the given site.</summary>
    /// <param name="options">The site.</param>
    /// <param name="clock">Clock.</param>
    public SiteKeys(SiteOptions options, TimeProvider clock) => (this.options, this.clock) = (options, clock);

    /// <inheritdoc/>
    public void Dispose() => opened?.Authority.Dispose();

    /// <summary>Opens the keys, making them at the very first start.</summary>
    internal async Task<Opened> OpenAsync(IStores stores, CancellationToken cancellationToken)
    {
        if (opened is { } known)
            return known;
        var row = await stores.Keys.FindSiteKeyAsync(cancellationToken);
        if (row is null)
        {
            // Of two first starters one insert wins; both then read the winner's row.
            await stores.Keys.AddSiteKeyAsync(Make(), cancellationToken);
            row = await stores.Keys.FindSiteKeyAsync(cancellationToken)
                ?? throw new InvalidOperationException("The site's keys could not be stored.");
        }
        else
        {
            opened = Open(row);
        }

        return opened ?? Open(row);
    }

    private Opened Open(SiteKeyRow row)
    {
        try
        {
            var certificate = SigningCertificate.Parse(row.CaCertificate).Require();
            var authority = SiteAuthority.Load(certificate, Sealing.Open(options.SealingKey, AuthorityPurpose, row.CaKeySealed));
            var signer = NoteSigner.FromSeed(row.Origin, Sealing.Open(options.SealingKey, NotePurpose, row.NoteKeySealed));
            return new Opened(authority, signer, row.Origin);
        }
        catch (AuthenticationTagMismatchException exception)
        {
            throw new InvalidOperationException("The sealing key is not the one under which this database's site keys were sealed.", exception);
        }
    }

    private SiteKeyRow Make()
    {
        var now = clock.Now();
        var start = new DateTimeOffset(now).AddMinutes(-5);
        using var authority = SiteAuthority.Create(options.Name, start, start.AddYears(30));
        var signer = NoteSigner.Generate(options.Origin);
        return new SiteKeyRow(
            authority.Certificate.ToDer(),
            Sealing.Seal(options.SealingKey, AuthorityPurpose, authority.ExportPrivateKey()),
            Sealing.Seal(options.SealingKey, NotePurpose, signer.ExportSeed()),
            signer.PublicKey.ToString(),
            options.Origin,
            now);
    }

    /// <summary>The keys in memory.</summary>
    /// <param name="Authority">Issues certificates.</param>
    /// <param name="Signer">Signs checkpoints.</param>
    /// <param name="Origin">Origin line.</param>
    internal sealed record Opened(SiteAuthority Authority, NoteSigner Signer, string Origin);
}
