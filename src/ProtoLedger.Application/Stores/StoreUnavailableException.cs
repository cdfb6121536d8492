namespace ProtoLedger.Application.Stores;

/// <summary>The database cannot be reached now. Whether a change was kept is unknown: ask again with the same idempotency key.</summary>
public sealed class StoreUnavailableException : Exception
{
    /// <summary>Without words.</summary>
    public StoreUnavailableException()
    {
    }

    /// <summary>In words.</summary>
    /// <param name="message">What happened.</param>
    public StoreUnavailableException(string message)
        : base(message)
    {
    }

    /// <summary>In words, with the cause.</summary>
    /// <param name="message">What happened.</param>
    /// <param name="innerException">Cause.</param>
    public StoreUnavailableException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
