namespace ProtoLedger.Storage.Clusters;

/// <summary>A private cluster that cannot run; the message is one line and says what to do.</summary>
public sealed class PrivateClusterException : Exception
{
    /// <summary>A cluster that cannot run.</summary>
    /// <param name="message">One line: what is wrong and what helps.</param>
    public PrivateClusterException(string message) : base(message)
    {
    }

    /// <summary>A cluster that cannot run.</summary>
    /// <param name="message">One line: what is wrong and what helps.</param>
    /// <param name="innerException">The cause.</param>
    public PrivateClusterException(string message, Exception innerException) : base(message, innerException)
    {
    }

    /// <summary>A cluster that cannot run for an unknown reason.</summary>
    public PrivateClusterException() : this("The private PostgreSQL cluster cannot run.")
    {
    }
}
