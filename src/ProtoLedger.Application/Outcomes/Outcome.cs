using System.Diagnostics.CodeAnalysis;

namespace ProtoLedger.Application.Outcomes;

/// <summary>What a use case gives back: a value, or a refusal. Exceptions are left for misuse and for machines that fail.</summary>
/// <typeparam name="T">The value.</typeparam>
public sealed class Outcome<T>
{
    private Outcome(T? value, Refusal? refusal) => (Value, Refusal) = (value, refusal);

    /// <summary>The value where <see cref="Succeeded"/>.</summary>
    public T? Value { get; }

    /// <summary>Why not, where not <see cref="Succeeded"/>.</summary>
    public Refusal? Refusal { get; }

    /// <summary>True when the effect happened, or the answer is there.</summary>
    [MemberNotNullWhen(true, nameof(Value))]
    [MemberNotNullWhen(false, nameof(Refusal))]
    public bool Succeeded => Refusal is null;

    /// <summary>Wraps a value.</summary>
    /// <param name="value">The value.</param>
    [SuppressMessage("Usage", "CA2225", Justification = "A use case ends in `return value;` or `return refusal;`.")]
    public static implicit operator Outcome<T>(T value) => new(value, null);

    /// <summary>Wraps a refusal.</summary>
    /// <param name="refusal">The refusal.</param>
    [SuppressMessage("Usage", "CA2225", Justification = "A use case ends in `return value;` or `return refusal;`.")]
    public static implicit operator Outcome<T>(Refusal refusal) => new(default, refusal);
}

/// <summary>Makes outcomes of types from which no conversion can be declared, such as lists.</summary>
public static class Outcome
{
    /// <summary>A value.</summary>
    /// <typeparam name="T">Its type.</typeparam>
    /// <param name="value">The value.</param>
    public static Outcome<T> Done<T>(T value) => value;
}
