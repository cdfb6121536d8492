namespace ProtoLedger.Storage.Sessions;

/// <summary>Breaks the n-th statement of this process, so that tests can show every command to be complete or a no-op.</summary>
/// <param name="failAt">Number of the statement, from 1, commits counted.</param>
public sealed class StatementFaults(int failAt)
{
    private int seen;

    /// <summary>True once the statement was reached.</summary>
    public bool Fired => Volatile.Read(ref seen) >= failAt;

    /// <summary>Counts a statement.</summary>
    /// <exception cref="IOException">It is the one.</exception>
    internal void Count()
    {
        if (Interlocked.Increment(ref seen) == failAt)
            throw new IOException($"Statement {failAt} was made to fail.");
    }
}
