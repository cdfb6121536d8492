using System.Diagnostics.CodeAnalysis;
using ProtoLedger.Application.Actors;

namespace ProtoLedger.Server.Http;

/// <summary>What every route says about itself: who may use it, and how it is asked.</summary>
internal static class RouteRules
{
    /// <summary>States who may use the route. A route that states nothing is refused to everybody.</summary>
    public static TBuilder Needs<TBuilder>(this TBuilder builder, RoleRule rule)
        where TBuilder : IEndpointConventionBuilder => builder.WithMetadata(rule);

    /// <summary>The route has an effect that must happen once: the caller names the request with an Idempotency-Key.</summary>
    public static RouteHandlerBuilder NeedsIdempotencyKey(this RouteHandlerBuilder builder) =>
        builder.WithMetadata(IdempotencyKeyNeeded.Instance).Refuses(Problems.KeyMissing, Problems.KeyUsedBefore, Problems.RequestInFlight);

    /// <summary>The route changes something that others may change too: the caller says which state it has seen.</summary>
    public static RouteHandlerBuilder NeedsIfMatch(this RouteHandlerBuilder builder) =>
        builder.WithMetadata(IfMatchNeeded.Instance).Refuses(Problems.PreconditionMissing, Problems.StaleVersion);

    /// <summary>The route takes a JSON body.</summary>
    public static RouteHandlerBuilder Takes<[DynamicallyAccessedMembers(DynamicallyAccessedMemberTypes.All)] T>(this RouteHandlerBuilder builder, string example)
        where T : notnull => builder
            .Accepts<T>("application/json")
            .WithMetadata(new RequestExample(example))
            .Refuses(Problems.MalformedRequest, Problems.TooLarge, Problems.MediaTypeNotKnown);

    /// <summary>Problems with which the route may answer, beside those of every route.</summary>
    public static RouteHandlerBuilder Refuses(this RouteHandlerBuilder builder, params ProblemType[] types)
    {
        foreach (var type in types)
            builder.WithMetadata(new RefusalMetadata(type));
        return builder;
    }
}

/// <summary>Marks a route that needs an Idempotency-Key.</summary>
internal sealed class IdempotencyKeyNeeded
{
    public static readonly IdempotencyKeyNeeded Instance = new();
}

/// <summary>Marks a route that needs If-Match.</summary>
internal sealed class IfMatchNeeded
{
    public static readonly IfMatchNeeded Instance = new();
}

/// <summary>A body that the route accepts, as JSON text.</summary>
internal sealed record RequestExample(string Json);

/// <summary>A problem that the route may answer with.</summary>
internal sealed record RefusalMetadata(ProblemType Type);
