namespace ProtoLedger.Application.Accounts;

/// <summary>Limits of sessions and of failed attempts.</summary>
/// <param name="IdleLimit">A session ends when unused for so long.</param>
/// <param name="AbsoluteLimit">A session ends after so long in any case.</param>
/// <param name="AttemptsBeforeLock">Failed attempts in a row before the account is locked.</param>
/// <param name="LockTime">How long it is locked.</param>
/// <param name="DemoAccounts">Whether people of the demonstration, whose password was printed, may sign in.</param>
public sealed record AccountOptions(TimeSpan IdleLimit, TimeSpan AbsoluteLimit, int AttemptsBeforeLock, TimeSpan LockTime, bool DemoAccounts = true)
{
    /// <summary>30 minutes idle, 12 hours at most; 5 attempts, then 15 minutes.</summary>
    public static AccountOptions Default { get; } = new(TimeSpan.FromMinutes(30), TimeSpan.FromHours(12), 5, TimeSpan.FromMinutes(15));
}
