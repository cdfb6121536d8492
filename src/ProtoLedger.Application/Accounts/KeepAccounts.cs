using System.Text.Json.Serialization;
using System.Text.RegularExpressions;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Accounts;

/// <summary>A new account.</summary>
/// <param name="Name">Lower-case letters, digits, dots and hyphens, a letter first, at most 64.</param>
/// <param name="DisplayName">Printed name.</param>
/// <param name="Roles">Roles.</param>
/// <param name="Password">First password; null where sign-in is elsewhere.</param>
/// <param name="Demo">Made for a demonstration: the rules on passwords are not applied.</param>
public sealed record NewAccount(
    string Name, string DisplayName, IReadOnlyList<string> Roles, [property: JsonIgnore] string? Password, bool Demo = false);

/// <summary>What an administrator may change.</summary>
/// <param name="Name">Account.</param>
/// <param name="Roles">New roles, or null to keep them.</param>
/// <param name="Disabled">New state, or null to keep it; disabling ends every session and token at once.</param>
/// <param name="Password">New password, or null to keep it; it ends every session. It never opens a signing key.</param>
public sealed record AccountChange(string Name, IReadOnlyList<string>? Roles, bool? Disabled, [property: JsonIgnore] string? Password);

/// <summary>Makes, lists and changes accounts.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="passwords">Hashes passwords.</param>
public sealed partial class KeepAccounts(Commands commands, Passwords passwords)
{
    private static readonly CommandKind Create = new("create-account", Rule);
    private static readonly CommandKind Change = new("change-account", Rule);
    private static readonly CommandKind List = new("list-accounts", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.KeepAccounts;

    /// <summary>Makes an account. A name is never used twice.</summary>
    /// <param name="caller">Who asks; only the program itself makes demonstration accounts.</param>
    /// <param name="account">The account.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<AccountView>> CreateAsync(Caller caller, NewAccount account, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Create, account.Name, account, command => AddAsync(command, account), cancellationToken);

    /// <summary>Changes roles, state or password.</summary>
    /// <param name="caller">Who asks; nobody changes their own roles or state.</param>
    /// <param name="change">What to change.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<AccountView>> ChangeAsync(Caller caller, AccountChange change, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Change, change.Name, change, command => ApplyAsync(command, change), cancellationToken);

    /// <summary>All accounts by name.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<AccountView>>> ListAsync(Caller caller, CancellationToken cancellationToken) =>
        commands.ReadAsync(
            caller,
            List,
            "accounts",
            async stores => Outcome.Done<IReadOnlyList<AccountView>>([.. (await stores.Accounts.ListAsync(cancellationToken)).Select(AccountView.Of)]),
            cancellationToken);

    [GeneratedRegex("^[a-z][a-z0-9.-]{0,63}$", RegexOptions.CultureInvariant)]
    private static partial Regex NamePattern();

    private static Invalid? UnknownRole(IEnumerable<string> roles) =>
        roles.FirstOrDefault(role => !Roles.All.Contains(role)) is { } unknown
            ? Invalid.Field("/roles", unknown, string.Join(", ", Roles.All), "There is no such role.")
            : null;

    private async Task<Outcome<AccountView>> AddAsync(Command command, NewAccount account)
    {
        if (!NamePattern().IsMatch(account.Name) || account.Name is "system" or "anonymous")
            return Invalid.Field("/name", account.Name, "lower-case letters, digits, dots and hyphens, a letter first, at most 64", "The name cannot be an account's.");
        if (string.IsNullOrWhiteSpace(account.DisplayName))
            return Invalid.Field("/displayName", account.DisplayName, "1 to 100 characters", "A printed name is needed.");
        if (Proposals.Text(account.DisplayName, "/displayName", 100, "1 to 100 characters") is { } fault)
            return fault;
        if (UnknownRole(account.Roles) is { } unknown)
            return unknown;
        var demo = account.Demo && command.Actor.Credential == Credential.System;
        if (!demo && account.Password is not null && Passwords.Refuse(account.Password, "/password", account.Name, account.DisplayName) is { } weak)
            return weak;
        var row = new AccountRow(
            account.Name, account.DisplayName, account.Password is null ? null : passwords.Hash(account.Password),
            [.. account.Roles.Distinct(StringComparer.Ordinal)], 0, null, false, demo, null, 0, command.Now);
        return await command.Stores.Accounts.AddAsync(row, command.Cancellation)
            ? AccountView.Of(row)
            : new Conflict($"The account name {account.Name} is or was in use.");
    }

    private async Task<Outcome<AccountView>> ApplyAsync(Command command, AccountChange change)
    {
        var row = await command.Stores.Accounts.FindAsync(change.Name, forUpdate: true, command.Cancellation);
        if (row is null)
            return new NotFound($"There is no account {change.Name}.");
        if (change.Name == command.Actor.Name && (change.Roles is not null || change.Disabled is not null))
            return new Forbidden("Nobody changes their own roles or state.");
        if (UnknownRole(change.Roles ?? []) is { } unknown)
            return unknown;
        var demo = row.Demo && command.Actor.Credential == Credential.System;
        if (!demo && change.Password is not null && Passwords.Refuse(change.Password, "/password", row.Name, row.DisplayName) is { } weak)
            return weak;
        var changed = row with
        {
            Roles = change.Roles is null ? row.Roles : [.. change.Roles.Distinct(StringComparer.Ordinal)],
            Disabled = change.Disabled ?? row.Disabled,
            PasswordHash = change.Password is null ? row.PasswordHash : passwords.Hash(change.Password),
            FailedAttempts = change.Password is null ? row.FailedAttempts : 0,
            LockedUntil = change.Password is null ? row.LockedUntil : null,
        };
        await command.Stores.Accounts.UpdateAsync(changed, command.Cancellation);
        if (change.Disabled == true || change.Password is not null)
            await command.Stores.Accounts.EndTokensAsync(row.Name, null, command.Now, command.Cancellation);
        return AccountView.Of(changed);
    }
}
