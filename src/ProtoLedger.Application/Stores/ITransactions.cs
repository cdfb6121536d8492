using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.Stores;

/// <summary>Runs work in one database transaction. A connection that broke before anything ran is replaced once; later faults surface.</summary>
public interface ITransactions
{
    /// <summary>Reads from one snapshot.</summary>
    /// <typeparam name="T">The answer.</typeparam>
    /// <param name="work">What to read; may run twice.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<T> ReadAsync<T>(Func<IStores, Task<T>> work, CancellationToken cancellationToken);

    /// <summary>Commits when <paramref name="work"/> succeeds, rolls back when it refuses or throws.</summary>
    /// <typeparam name="T">The result.</typeparam>
    /// <param name="work">What to do; may run twice, so it touches nothing outside the database.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<Outcome<T>> WriteAsync<T>(Func<IStores, Task<Outcome<T>>> work, CancellationToken cancellationToken);
}

/// <summary>The stores of one transaction.</summary>
public interface IStores
{
    /// <summary>Immutable versions.</summary>
    IDocumentStore Documents { get; }

    /// <summary>Change requests, comments, reports and signatures.</summary>
    IChangeRequestStore ChangeRequests { get; }

    /// <summary>What was effective and loaded where.</summary>
    IFactStore Facts { get; }

    /// <summary>Leaves, nodes, checkpoints and blobs.</summary>
    ILedgerStore Ledger { get; }

    /// <summary>Regression runs, their jobs and results.</summary>
    IRunStore Runs { get; }

    /// <summary>Accounts, sessions and tokens.</summary>
    IAccountStore Accounts { get; }

    /// <summary>Signing keys and certificates.</summary>
    IKeyStore Keys { get; }

    /// <summary>Everything of record.</summary>
    IRecordStore Records { get; }

    /// <summary>Audit events.</summary>
    IAuditStore Audit { get; }

    /// <summary>Answers kept by idempotency key.</summary>
    IIdempotencyStore Idempotency { get; }
}
