namespace ProtoLedger.Ledger;

/// <summary>Outcome of reading bytes from outside: the value, or what is wrong with them in words.</summary>
/// <typeparam name="T">What the bytes stand for.</typeparam>
public abstract record Parsed<T>
{
    private Parsed()
    {
    }

    /// <summary>The value, for bytes that have been checked before.</summary>
    /// <exception cref="FormatException">The bytes are bad; the message says why.</exception>
    public T Require() => this switch
    {
        Good(var value) => value,
        Bad(var reason) => throw new FormatException(reason),
        _ => throw new System.Diagnostics.UnreachableException(),
    };

    /// <summary>Well-formed.</summary>
    public sealed record Good(T Value) : Parsed<T>;

    /// <summary>Not well-formed.</summary>
    /// <param name="Reason">One sentence, without a full stop at the end.</param>
    public sealed record Bad(string Reason) : Parsed<T>;

    /// <summary>Runs a reader that reports faults as <see cref="FormatException"/>.</summary>
    internal static Parsed<T> From(Func<T> read)
    {
        try
        {
            return new Good(read());
        }
        catch (FormatException fault)
        {
            return new Bad(fault.Message);
        }
    }
}
