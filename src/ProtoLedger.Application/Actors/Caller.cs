namespace ProtoLedger.Application.Actors;

/// <summary>An actor with what a repeatable request carries.</summary>
/// <param name="Actor">Who asks.</param>
/// <param name="IdempotencyKey">Key chosen by the client, 1 to 200 characters; null where the operation needs none.</param>
/// <param name="Address">Where the request came from, for the audit trail; null for the program itself.</param>
public sealed record Caller(Actor Actor, string? IdempotencyKey = null, string? Address = null)
{
    /// <summary>The program itself.</summary>
    public static Caller System { get; } = new(Actor.System);
}
