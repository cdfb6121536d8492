namespace ProtoLedger.Application.Commanding;

/// <summary>Times as the database keeps them: UTC, whole microseconds. They are cut before anything is hashed.</summary>
internal static class UtcTime
{
    /// <summary>Now, by the given clock.</summary>
    public static DateTime Now(this TimeProvider clock) => Cut(clock.GetUtcNow().UtcDateTime);

    /// <summary>The same moment, cut to the microsecond.</summary>
    public static DateTime Cut(DateTime time) => time.AddTicks(-(time.Ticks % TimeSpan.TicksPerMicrosecond));
}
