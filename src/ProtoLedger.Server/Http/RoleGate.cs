using System.Net.Http.Headers;
using Microsoft.Net.Http.Headers;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;

namespace ProtoLedger.Server.Http;

/// <summary>Finds out who asks, and lets only those pass whom the route's rule allows. A route without a rule lets nobody pass.</summary>
internal sealed class RoleGate(RequestDelegate next)
{
    private const int LongestKey = 200;

    public async Task InvokeAsync(HttpContext context, CurrentCaller current, Authenticate authenticate, RecordDenial denial)
    {
        if (context.GetEndpoint() is not RouteEndpoint endpoint)
        {
            await next(context);
            return;
        }

        var rule = endpoint.Metadata.GetMetadata<RoleRule>();
        var address = context.Connection.RemoteIpAddress?.ToString();
        var actor = Actor.Anonymous;
        var page = endpoint.Metadata.GetMetadata<PageRoute>() is not null;
        if ((BearerToken(context.Request) ?? CookieToken(context.Request, page)) is { } token)
        {
            if (await authenticate.RunAsync(token, context.RequestAborted) is { } known)
            {
                actor = known;
            }
            else if (page)
            {
                SessionCookie.Clear(context.Response);
            }
            else if (rule is not { AllowsAnonymous: true })
            {
                await Problems.NeedsSignIn("The token is unknown, has expired or was ended.").ExecuteAsync(context);
                return;
            }
        }

        current.Caller = new Caller(actor, null, address);
        if (rule?.Allows(actor) != true)
        {
            await denial.RunAsync(current.Caller, $"{context.Request.Method} {endpoint.RoutePattern.RawText}", rule?.Name ?? "no rule", context.RequestAborted);
            if (page && actor.Credential == Credential.None)
                context.Response.Redirect(SignInAddress(context.Request));
            else if (page)
                context.Response.StatusCode = StatusCodes.Status403Forbidden;
            else
                await Refuse(actor, rule).ExecuteAsync(context);
            return;
        }

        if (endpoint.Metadata.GetMetadata<IdempotencyKeyNeeded>() is not null)
        {
            if (IdempotencyKey(context.Request) is not { } key)
            {
                await Problems.Of(Problems.KeyMissing, $"Send the header Idempotency-Key with 1 to {LongestKey} printable ASCII characters of your own choice, new for each request, the same when it is repeated.").ExecuteAsync(context);
                return;
            }

            current.Caller = current.Caller with { IdempotencyKey = key };
        }

        await next(context);
    }

    private static Problem Refuse(Actor actor, RoleRule? rule) =>
        actor.Credential == Credential.None
            ? Problems.NeedsSignIn("Sign in with POST /api/v1/session and send the token as Authorization: Bearer.")
            : Problems.Of(Problems.NotAllowed, (rule, actor.Credential) switch
            {
                (null, _) => "No rule allows anybody to use this address.",
                (_, Credential.Token) => $"An API token with the scopes {string.Join(", ", actor.Scopes ?? [])} does not allow: {rule.Name}.",
                _ => $"Needed is one of the roles {string.Join(", ", rule.AllowedRoles)}; {actor.Name} has {string.Join(", ", actor.Roles)}.",
            });

    /// <summary>The token of the header Authorization; null without one.</summary>
    internal static string? BearerToken(HttpRequest request) =>
        AuthenticationHeaderValue.TryParse(request.Headers[HeaderNames.Authorization], out var header)
        && header.Scheme.Equals("Bearer", StringComparison.OrdinalIgnoreCase) ? header.Parameter ?? "" : null;

    /// <summary>Forms of pages carry a token of their own; scripts of pages carry a header. Reading needs neither.</summary>
    private static string? CookieToken(HttpRequest request, bool page) =>
        page || HttpMethods.IsGet(request.Method) || HttpMethods.IsHead(request.Method) || request.Headers.ContainsKey(SessionCookie.ScriptHeader)
            ? SessionCookie.Read(request)
            : null;

    private static string SignInAddress(HttpRequest request) =>
        HttpMethods.IsGet(request.Method) && request.Path != "/" ? "/sign-in" + QueryString.Create("next", request.Path + request.QueryString) : "/sign-in";

    private static string? IdempotencyKey(HttpRequest request)
    {
        var key = request.Headers["Idempotency-Key"].ToString().Trim();
        return key.Length is > 0 and <= LongestKey && key.All(c => c is > ' ' and <= '~' or ' ') ? key : null;
    }
}

/// <summary>Who asks; set by <see cref="RoleGate"/> once for each request.</summary>
internal sealed class CurrentCaller
{
    public Caller Caller { get; set; } = new(Actor.Anonymous);
}
