namespace ProtoLedger.Storage.Migrations;

/// <summary>The schema cannot be brought to what this program needs.</summary>
public sealed class MigrationException : Exception
{
    /// <summary>Without words.</summary>
    public MigrationException()
    {
    }

    /// <summary>In words.</summary>
    /// <param name="message">What is wrong.</param>
    public MigrationException(string message)
        : base(message)
    {
    }

    /// <summary>In words, with the cause.</summary>
    /// <param name="message">What is wrong.</param>
    /// <param name="innerException">Cause.</param>
    public MigrationException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
