namespace ProtoLedger.Physics.Prediction;

/// <summary>Which model computed a number.</summary>
public static class ModelIdentity
{
    /// <summary>Raised whenever any predicted number changes; a test compares it with the probe hash.</summary>
    public const int Version = 1;

    /// <summary>Version and hash of the probe results, such as <c>1-0f3a…</c>: the version constant, a hyphen, and 16 hexadecimal digits.</summary>
    public static string Current => throw new NotSupportedException("The engine is being built.");
}
