namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>A time made of duration slots: Σ count · duration.</summary>
/// <param name="Terms">Slots in rising order, each with its count.</param>
internal sealed record TimeSum((int Slot, int Count)[] Terms)
{
    internal static TimeSum Of(IEnumerable<int> slots) =>
        new([.. slots.GroupBy(s => s).OrderBy(g => g.Key).Select(g => (g.Key, g.Count()))]);

    internal double Evaluate(ReadOnlySpan<double> durations)
    {
        var sum = 0.0;
        foreach (var (slot, count) in Terms)
            sum += count * durations[slot];
        return sum;
    }

    public bool Equals(TimeSum? other) => other is not null && Terms.SequenceEqual(other.Terms);

    public override int GetHashCode() => Terms.Aggregate(17, (hash, term) => HashCode.Combine(hash, term));
}
