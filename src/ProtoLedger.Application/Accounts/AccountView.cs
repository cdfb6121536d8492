using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Accounts;

/// <summary>An account as its keepers see it.</summary>
/// <param name="Name">Name.</param>
/// <param name="DisplayName">Printed name.</param>
/// <param name="Roles">Roles.</param>
/// <param name="Disabled">True when it may not sign in.</param>
/// <param name="LockedUntil">UTC, or null.</param>
/// <param name="HasSecondFactor">True when sign-in asks for a code.</param>
/// <param name="Demo">Made for a demonstration.</param>
/// <param name="CreatedAt">UTC.</param>
public sealed record AccountView(
    string Name,
    string DisplayName,
    IReadOnlyList<string> Roles,
    bool Disabled,
    DateTime? LockedUntil,
    bool HasSecondFactor,
    bool Demo,
    DateTime CreatedAt)
{
    /// <summary>The view of a row.</summary>
    internal static AccountView Of(AccountRow row) =>
        new(row.Name, row.DisplayName, row.Roles, row.Disabled, row.LockedUntil, row.TotpSecret is not null, row.Demo, row.CreatedAt);
}
