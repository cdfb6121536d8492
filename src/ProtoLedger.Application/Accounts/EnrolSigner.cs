using System.Text.Json.Nodes;
using System.Text.Json.Serialization;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Site;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Application.Accounts;

/// <summary>An enrolment: the owner types the passphrase, another person vouches for who they are.</summary>
/// <param name="Account">Whose key it is.</param>
/// <param name="Passphrase">Signing passphrase; never kept, never recovered.</param>
public sealed record Enrolment(string Account, [property: JsonIgnore] string Passphrase);

/// <summary>A signing certificate as any reader sees it.</summary>
/// <param name="Account">Owner.</param>
/// <param name="CertificateSha256">Hash of its bytes, lower-case hexadecimal.</param>
/// <param name="Certificate">DER.</param>
/// <param name="EnrolledBy">Who vouched.</param>
/// <param name="CreatedAt">UTC.</param>
public sealed record CertificateView(string Account, string CertificateSha256, byte[] Certificate, string EnrolledBy, DateTime CreatedAt);

/// <summary>Gives a person a signing key and certificate. A further enrolment revokes the certificate before: a reset makes a new key.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="keys">The site's authority.</param>
/// <param name="ledger">Records it.</param>
public sealed class EnrolSigner(Commands commands, SiteKeys keys, LedgerWriter ledger)
{
    private const int ValidYears = 3;
    private static readonly CommandKind Kind = new("enrol-signer", Rule);

    /// <summary>Who may vouch.</summary>
    public static RoleRule Rule => RoleRule.KeepAccounts;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who vouches: another person than the owner.</param>
    /// <param name="enrolment">Whose key.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<CertificateView>> RunAsync(Caller caller, Enrolment enrolment, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, enrolment.Account, enrolment, command => EnrolAsync(command, enrolment), cancellationToken);

    private async Task<Outcome<CertificateView>> EnrolAsync(Command command, Enrolment enrolment)
    {
        if (enrolment.Account == command.Actor.Name)
            return new Forbidden("Another person must vouch for an enrolment.");
        var account = await command.Stores.Accounts.FindAsync(enrolment.Account, forUpdate: true, command.Cancellation);
        if (account is null || account.Disabled)
            return new NotFound($"There is no account {enrolment.Account} that could sign.");
        if (!account.Demo && Passwords.Refuse(enrolment.Passphrase, "/passphrase", account.Name, account.DisplayName) is { } weak)
            return weak;
        var facts = new List<Fact>();
        if (await command.Stores.Keys.FindPersonKeyAsync(account.Name, command.Cancellation) is { } old)
        {
            var revocation = new RevocationRow(old.CertificateSha256, command.Now, command.Actor.Name, "superseded");
            await command.Stores.Keys.AddRevocationAsync(revocation, command.Cancellation);
            facts.Add(RevokeCertificate.Fact(revocation, account.Name));
        }

        var row = await IssueAsync(command, account, enrolment.Passphrase);
        await command.Stores.Keys.AddPersonKeyAsync(row, command.Cancellation);
        facts.Add(new Fact("certificate-issued", $"account/{row.Account}", Values(row), ("certificate", row.Certificate)));
        await ledger.AppendAsync(command, [.. facts]);
        return new CertificateView(row.Account, Convert.ToHexStringLower(row.CertificateSha256), row.Certificate, row.EnrolledBy, row.CreatedAt);
    }

    /// <summary>Every value of a certificate that the ledger holds.</summary>
    internal static JsonObject Values(PersonKeyRow row) => new()
    {
        ["account"] = row.Account,
        ["certificateSha256"] = Convert.ToHexStringLower(row.CertificateSha256),
        ["enrolledBy"] = row.EnrolledBy,
        ["createdAt"] = VersionFacts.Time(row.CreatedAt),
    };

    private async Task<PersonKeyRow> IssueAsync(Command command, AccountRow account, string passphrase)
    {
        var site = await keys.OpenAsync(command.Stores, command.Cancellation);
        using var key = PersonKey.Generate();
        var start = new DateTimeOffset(command.Now).AddMinutes(-1);
        var certificate = site.Authority.Issue(
            new Person(account.Name, account.DisplayName), key.PublicKey, start, start.AddYears(ValidYears), SiteAuthority.NewSerial());
        return new PersonKeyRow(
            certificate.Fingerprint.ToArray(), account.Name, certificate.ToDer(), key.Wrap(passphrase, certificate).ToBytes(),
            command.Actor.Name, command.Now);
    }
}
