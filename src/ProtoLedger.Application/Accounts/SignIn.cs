using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Accounts;

/// <summary>What is typed to sign in.</summary>
/// <param name="Name">Account name; case and surrounding blanks do not matter.</param>
/// <param name="Password">Password.</param>
/// <param name="Code">Six digits of the second factor, where the account has one.</param>
public sealed record Credentials(string Name, string Password, string? Code = null);

/// <summary>A new session.</summary>
/// <param name="Token">Secret, shown once.</param>
/// <param name="ExpiresAt">UTC, absolute end.</param>
/// <param name="Actor">Who is signed in.</param>
public sealed record NewSession(string Token, DateTime ExpiresAt, Actor Actor);

/// <summary>Opens a session. Why it is refused is not told, except that an account is locked.</summary>
/// <param name="transactions">Transactions.</param>
/// <param name="commands">Writes the audit trail.</param>
/// <param name="passwords">Checks passwords.</param>
/// <param name="secondFactor">Checks the second factor.</param>
/// <param name="options">Limits.</param>
/// <param name="clock">Clock.</param>
public sealed class SignIn(
    ITransactions transactions, Commands commands, Passwords passwords, SecondFactor secondFactor, AccountOptions options, TimeProvider clock)
{
    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Anyone;

    /// <summary>Runs it.</summary>
    /// <param name="caller">From where.</param>
    /// <param name="credentials">What was typed.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Outcome<NewSession>> RunAsync(Caller caller, Credentials credentials, CancellationToken cancellationToken)
    {
        var name = credentials.Name.Trim().ToLowerInvariant();
        if (name.Length is 0 or > 64 || name.Any(char.IsControl) || credentials.Password.Length > 1000)
            return new Unauthenticated("Name, password or code are wrong.");
        var account = await transactions.ReadAsync(stores => stores.Accounts.FindAsync(name, forUpdate: false, cancellationToken), cancellationToken);

        // The slow check runs outside a transaction, also for an account that does not exist.
        var good = passwords.Verify(account?.PasswordHash, credentials.Password);
        var outcome = await transactions.WriteAsync(stores => OpenAsync(stores, name, good, credentials.Code, cancellationToken), cancellationToken);
        if (outcome.Refusal is Unauthenticated)
            await transactions.WriteAsync<bool>(async stores => await Attempts.CountAsync(stores, options, name, clock.Now(), cancellationToken), cancellationToken);
        await commands.RecordAsync(
            caller with { Actor = new Actor(name, name, [], Credential.None) },
            "sign-in", name, outcome.Succeeded ? "done" : "denied", outcome.Refusal?.Detail ?? "", cancellationToken);
        return outcome;
    }

    private async Task<Outcome<NewSession>> OpenAsync(IStores stores, string name, bool good, string? code, CancellationToken cancellationToken)
    {
        var now = clock.Now();
        var account = await stores.Accounts.FindAsync(name, forUpdate: true, cancellationToken);
        if (account?.LockedUntil is { } until && until > now)
            return new LockedOut("The account is locked after failed attempts.", until);
        if (account is null || !good || account.Disabled || (account.Demo && !options.DemoAccounts) || !secondFactor.Accepts(account, code, now, out var step))
            return new Unauthenticated("Name, password or code are wrong.");
        await stores.Accounts.UpdateAsync(account with { FailedAttempts = 0, LockedUntil = null, TotpStep = step }, cancellationToken);
        var secret = Secrets.New(session: true);
        var expires = now + options.AbsoluteLimit;
        await stores.Accounts.AddTokenAsync(
            new TokenRow(Secrets.Hash(secret), name, "session", "", [], now, now, expires, null), cancellationToken);
        return new NewSession(secret, expires, new Actor(account.Name, account.DisplayName, account.Roles));
    }
}
