using System.Diagnostics;
using System.Globalization;
using System.Reflection;
using Microsoft.Net.Http.Headers;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server;

/// <summary>Every problem that leaves the server is made here (RFC 9457).</summary>
internal static class Problems
{
    public static readonly ProblemType MalformedRequest = new("malformed-request", 400, "The request does not have the shape that is asked for");
    public static readonly ProblemType KeyMissing = new("idempotency-key-missing", 400, "An Idempotency-Key is needed");
    public static readonly ProblemType SignInNeeded = new("sign-in-needed", 401, "Sign in first");
    public static readonly ProblemType NotAllowed = new("not-allowed", 403, "Your role does not allow this");
    public static readonly ProblemType CannotBeSigned = new("cannot-be-signed", 403, "This cannot be signed");
    public static readonly ProblemType Missing = new("not-found", 404, "There is nothing at this address");
    public static readonly ProblemType MethodNotKnown = new("method-not-allowed", 405, "This address does not take that method");
    public static readonly ProblemType BaseHasMoved = new("base-moved", 409, "The base version is no longer the newest");
    public static readonly ProblemType WrongState = new("wrong-state", 409, "The change request is not in a state that allows this");
    public static readonly ProblemType StillComputing = new("still-computing", 409, "The result is still being computed");
    public static readonly ProblemType RequestInFlight = new("request-in-flight", 409, "The same request is being carried out");
    public static readonly ProblemType Clash = new("conflict", 409, "The request conflicts with what is stored");
    public static readonly ProblemType StaleVersion = new("stale-version", 412, "Somebody changed this since you read it");
    public static readonly ProblemType TooLarge = new("too-large", 413, "The request is too large");
    public static readonly ProblemType MediaTypeNotKnown = new("media-type-not-known", 415, "The body is not of a known media type");
    public static readonly ProblemType InvalidContent = new("invalid-content", 422, "The content is not valid");
    public static readonly ProblemType KeyUsedBefore = new("idempotency-key-reused", 422, "The Idempotency-Key was used for another request");
    public static readonly ProblemType PreconditionMissing = new("precondition-missing", 428, "An If-Match header is needed");
    public static readonly ProblemType TooManyRequests = new("too-many-requests", 429, "Too many requests");
    public static readonly ProblemType AccountLocked = new("account-locked", 429, "The account is locked for a while");
    public static readonly ProblemType Internal = new("internal-error", 500, "Something went wrong inside");
    public static readonly ProblemType DatabaseAway = new("database-away", 503, "The database cannot be reached");
    public static readonly ProblemType NotReadyYet = new("not-ready", 503, "The server is not ready yet");

    /// <summary>Every type of problem, by name.</summary>
    public static IReadOnlyList<ProblemType> All { get; } =
    [
        .. typeof(Problems).GetFields(BindingFlags.Public | BindingFlags.Static)
            .Select(field => field.GetValue(null)).OfType<ProblemType>().OrderBy(type => type.Name, StringComparer.Ordinal),
    ];

    /// <summary>The problem that tells of a refusal of the application.</summary>
    public static Problem From(Refusal refusal) => refusal switch
    {
        NotFound => Of(Missing, refusal.Detail),
        Unauthenticated => NeedsSignIn(refusal.Detail),
        LockedOut(var detail, var until) => Of(AccountLocked, detail).WithRetryAfter(until - DateTime.UtcNow).With("until", until),
        Forbidden => Of(NotAllowed, refusal.Detail),
        Stale(var detail, var expected, var current) =>
            Of(StaleVersion, detail).WithHeader(HeaderNames.ETag, EntityTags.Of(current)).With("expected", expected).With("current", current),
        BaseMoved(var detail, var baseVersion, var newest, var pending) =>
            Of(BaseHasMoved, detail).With("baseVersion", baseVersion).With("newestVersion", newest).With("pendingRequest", pending),
        IllegalState(var detail, var state, var step) => Of(WrongState, detail).With("state", state.ToWord()).With("step", step),
        Invalid(var detail, var errors) => Of(InvalidContent, detail).WithErrors(errors),
        NotReady(var detail, var run) => Of(StillComputing, detail).WithRetryAfter(TimeSpan.FromSeconds(2)).With("runId", run),
        CannotSign => Of(CannotBeSigned, refusal.Detail),
        KeyReused => Of(KeyUsedBefore, refusal.Detail),
        InFlight => Of(RequestInFlight, refusal.Detail).WithRetryAfter(TimeSpan.FromSeconds(1)),
        Conflict => Of(Clash, refusal.Detail),
        var other => throw new UnreachableException(other.GetType().Name),
    };

    public static Problem Of(ProblemType type, string detail) => new(type, detail);

    /// <summary>A request whose body or parameters do not have the shape asked for.</summary>
    public static Problem Malformed(string detail, params IReadOnlyList<FieldError> errors) => Of(MalformedRequest, detail).WithErrors(errors);

    public static Problem NeedsSignIn(string detail) => Of(SignInNeeded, detail).WithHeader(HeaderNames.WWWAuthenticate, "Bearer");

    public static Problem DatabaseIsAway() =>
        Of(DatabaseAway, "Nothing was changed that was not acknowledged. Try again with the same Idempotency-Key.").WithRetryAfter(TimeSpan.FromSeconds(5));

    /// <summary>The problem for a status that the platform set without a body.</summary>
    public static Problem ForStatus(int status, string path) => status switch
    {
        401 => NeedsSignIn("The request carries no valid token."),
        404 => Of(Missing, $"Nothing is found at {path}."),
        405 => Of(MethodNotKnown, $"The header Allow names what {path} takes."),
        413 => Of(TooLarge, "A request body may have 1 MiB at most."),
        415 => Of(MediaTypeNotKnown, "Send the body as application/json."),
        429 => Of(TooManyRequests, "Wait before the next request."),
        503 => Of(NotReadyYet, "Try again soon.").WithRetryAfter(TimeSpan.FromSeconds(2)),
        >= 500 => Of(Internal, "The error is in the server's log under the trace id."),
        _ => Of(MalformedRequest, string.Create(CultureInfo.InvariantCulture, $"The request was refused with status {status}.")),
    };
}
