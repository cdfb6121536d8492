namespace ProtoLedger.Application.Stores;

/// <summary>Who did, read, signed or was denied what.</summary>
public interface IAuditStore
{
    /// <summary>Stores an event.</summary>
    /// <param name="auditEvent">The event; its number is ignored.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddAsync(AuditEvent auditEvent, CancellationToken cancellationToken);

    /// <summary>Events, newest first.</summary>
    /// <param name="filter">Which.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<AuditEvent>> ListAsync(AuditFilter filter, CancellationToken cancellationToken);
}

/// <summary>An event of the audit trail.</summary>
/// <param name="Number">Ascending.</param>
/// <param name="Time">UTC, microseconds.</param>
/// <param name="Actor">Account name, or what was typed as one.</param>
/// <param name="Action">Use case, such as <c>approve-change-request</c>.</param>
/// <param name="Subject">What it was about.</param>
/// <param name="Outcome">done, denied, failed or read.</param>
/// <param name="Detail">In words.</param>
/// <param name="Address">Where it came from, or null.</param>
public sealed record AuditEvent(
    long Number, DateTime Time, string Actor, string Action, string Subject, string Outcome, string Detail, string? Address);

/// <summary>Which events to list.</summary>
/// <param name="Actor">Only this account, or null.</param>
/// <param name="Action">Only this action, or null.</param>
/// <param name="Outcome">Only this outcome, or null.</param>
/// <param name="From">Not before, UTC, or null.</param>
/// <param name="Until">Before, UTC, or null.</param>
/// <param name="Before">Only numbers below, or null.</param>
/// <param name="Limit">Most rows, 1 to 1,000.</param>
public sealed record AuditFilter(
    string? Actor = null, string? Action = null, string? Outcome = null, DateTime? From = null, DateTime? Until = null, long? Before = null, int Limit = 100);

/// <summary>Answers kept by idempotency key, in the transaction of their effect.</summary>
public interface IIdempotencyStore
{
    /// <summary>Takes the key for this transaction without waiting; false when another transaction holds it.</summary>
    /// <param name="account">Account.</param>
    /// <param name="key">Key.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<bool> TryLockAsync(string account, string key, CancellationToken cancellationToken);

    /// <summary>The kept answer, or null.</summary>
    /// <param name="account">Account.</param>
    /// <param name="key">Key.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<KeptAnswer?> FindAsync(string account, string key, CancellationToken cancellationToken);

    /// <summary>Keeps an answer.</summary>
    /// <param name="account">Account.</param>
    /// <param name="key">Key.</param>
    /// <param name="answer">The answer.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddAsync(string account, string key, KeptAnswer answer, CancellationToken cancellationToken);
}

/// <summary>A kept answer.</summary>
/// <param name="RequestSha256">Hash of the request that it answers.</param>
/// <param name="Response">JSON of the result.</param>
/// <param name="CreatedAt">UTC.</param>
public sealed record KeptAnswer(byte[] RequestSha256, byte[] Response, DateTime CreatedAt);
