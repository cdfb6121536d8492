using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Application.Accounts;

/// <summary>Opens the signing key of the person who acts, under the passphrase that only they know.</summary>
public sealed class SigningKeys
{
    private readonly Commands commands;
    private readonly ITransactions transactions;
    private readonly TimeProvider clock;
    private readonly AccountOptions options;

    /// <summary>With the given limits.</summary>
    /// <param name="commands">Writes the audit trail.</param>
    /// <param name="transactions">Transactions.</param>
    /// <param name="clock">Clock.</param>
    /// <param name="options">Limits of failed attempts.</param>
    public SigningKeys(Commands commands, ITransactions transactions, TimeProvider clock, AccountOptions options) =>
        (this.commands, this.transactions, this.clock, this.options) = (commands, transactions, clock, options);

    /// <summary>The key, or why it cannot be used; a locked or disabled account signs nothing.</summary>
    internal async Task<(OpenedKey? Key, Refusal? Refusal)> OpenAsync(Command command, string passphrase)
    {
        var account = await command.Stores.Accounts.FindAsync(command.Actor.Name, forUpdate: false, command.Cancellation);
        if (account is null || account.Disabled)
            return (null, new Forbidden($"The account {command.Actor.Name} is disabled."));
        if (account.LockedUntil is { } until && until > clock.Now())
            return (null, new LockedOut("The account is locked after failed attempts.", until));
        var row = await command.Stores.Keys.FindPersonKeyAsync(command.Actor.Name, command.Cancellation);
        return row is null
            ? (null, new CannotSign($"{command.Actor.Name} has no signing key: another person must enrol it first."))
            : Unwrap(command, row, passphrase);
    }

    /// <summary>Counts a wrong passphrase like a wrong password.</summary>
    internal async Task CountFailureAsync(Caller caller, CancellationToken cancellationToken)
    {
        var locked = await transactions.WriteAsync<bool>(
            async stores => await Attempts.CountAsync(stores, options, caller.Actor.Name, clock.Now(), cancellationToken), cancellationToken);
        if (locked.Value)
            await commands.RecordAsync(caller, "lock-account", caller.Actor.Name, "failed", "Too many failed attempts to sign.", cancellationToken);
    }

    private static (OpenedKey? Key, Refusal? Refusal) Unwrap(Command command, PersonKeyRow row, string passphrase)
    {
        var certificate = SigningCertificate.Parse(row.Certificate).Require();
        var now = new DateTimeOffset(command.Now);
        if (now < certificate.NotBefore || now > certificate.NotAfter)
            return (null, new CannotSign($"The certificate of {row.Account} is valid from {certificate.NotBefore:u} to {certificate.NotAfter:u}: renew it."));
        return WrappedKey.Parse(row.WrappedKey).Require().Unwrap(passphrase) switch
        {
            Unwrapping.Opened(var key) => (new OpenedKey(key, certificate), null),
            _ => (null, new CannotSign("The signing passphrase is wrong.")),
        };
    }
}

/// <summary>A key that is open for one signature.</summary>
/// <param name="Key">The key; whoever opened it disposes it.</param>
/// <param name="Certificate">Its certificate.</param>
internal readonly record struct OpenedKey(PersonKey Key, SigningCertificate Certificate);
