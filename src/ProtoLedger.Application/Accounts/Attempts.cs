using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Accounts;

/// <summary>Counts failed attempts and locks.</summary>
internal static class Attempts
{
    /// <summary>Counts one; true when it locked the account.</summary>
    public static async Task<bool> CountAsync(
        IStores stores, AccountOptions options, string name, DateTime now, CancellationToken cancellationToken)
    {
        if (await stores.Accounts.FindAsync(name, forUpdate: true, cancellationToken) is not { } account)
            return false;
        var attempts = account.FailedAttempts + 1;
        var locks = attempts >= options.AttemptsBeforeLock;
        var counted = account with
        {
            FailedAttempts = locks ? 0 : attempts,
            LockedUntil = locks ? now + options.LockTime : account.LockedUntil,
        };
        await stores.Accounts.UpdateAsync(counted, cancellationToken);
        return locks;
    }
}
