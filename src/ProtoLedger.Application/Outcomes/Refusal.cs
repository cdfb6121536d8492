using ProtoLedger.Application.ChangeRequests;

namespace ProtoLedger.Application.Outcomes;

/// <summary>Why a use case did nothing. A closed set: each kind is one problem type over HTTP.</summary>
/// <param name="Detail">In words, with the values that matter.</param>
public abstract record Refusal(string Detail);

/// <summary>Nothing is known under that name.</summary>
/// <param name="Detail">What was looked for.</param>
public sealed record NotFound(string Detail) : Refusal(Detail);

/// <summary>Nobody is signed in, or name, password, code or token are wrong. The reason is not told.</summary>
/// <param name="Detail">In words.</param>
public sealed record Unauthenticated(string Detail) : Refusal(Detail);

/// <summary>The account is locked after failed attempts.</summary>
/// <param name="Detail">In words.</param>
/// <param name="Until">When it opens again, UTC.</param>
public sealed record LockedOut(string Detail, DateTime Until) : Refusal(Detail);

/// <summary>The actor's role, or their part in the matter, does not allow it.</summary>
/// <param name="Detail">Which rule.</param>
public sealed record Forbidden(string Detail) : Refusal(Detail);

/// <summary>The record was changed since the client read it.</summary>
/// <param name="Detail">In words.</param>
/// <param name="Expected">Row version that the client named.</param>
/// <param name="Current">Row version now.</param>
public sealed record Stale(string Detail, long Expected, long Current) : Refusal(Detail);

/// <summary>The base of a proposal is not the newest effective or pending version any more.</summary>
/// <param name="Detail">Names both.</param>
/// <param name="BaseVersion">Version on which the proposal stands.</param>
/// <param name="NewestVersion">Newest stored version; 0 where there is none.</param>
/// <param name="PendingRequest">Change request under review for the same document, or null.</param>
public sealed record BaseMoved(string Detail, int BaseVersion, int NewestVersion, long? PendingRequest) : Refusal(Detail);

/// <summary>The step is not allowed in the record's state.</summary>
/// <param name="Detail">Names state and step.</param>
/// <param name="State">State now.</param>
/// <param name="Step">What was asked.</param>
public sealed record IllegalState(string Detail, ChangeRequestState State, string Step) : Refusal(Detail);

/// <summary>Input that breaks a rule.</summary>
/// <param name="Detail">In words.</param>
/// <param name="Errors">Each fault.</param>
public sealed record Invalid(string Detail, IReadOnlyList<FieldError> Errors) : Refusal(Detail)
{
    /// <summary>One fault.</summary>
    /// <param name="pointer">JSON pointer into the request.</param>
    /// <param name="value">Value as text, or null.</param>
    /// <param name="limit">What is allowed.</param>
    /// <param name="detail">Why.</param>
    public static Invalid Field(string pointer, string? value, string limit, string detail) =>
        new(detail, [new FieldError(pointer, value, limit, detail)]);
}

/// <summary>One fault in an input.</summary>
/// <param name="Pointer">JSON pointer.</param>
/// <param name="Value">Value as text, or null where it is missing.</param>
/// <param name="Limit">What is allowed.</param>
/// <param name="Detail">Why, in words.</param>
public sealed record FieldError(string Pointer, string? Value, string Limit, string Detail);

/// <summary>The run or report that the step needs is not finished.</summary>
/// <param name="Detail">In words.</param>
/// <param name="RunId">The run, or null where none was queued.</param>
public sealed record NotReady(string Detail, long? RunId) : Refusal(Detail);

/// <summary>The signing passphrase is wrong, or the account has no valid signing key.</summary>
/// <param name="Detail">In words.</param>
public sealed record CannotSign(string Detail) : Refusal(Detail);

/// <summary>The idempotency key is missing, or was used for another request.</summary>
/// <param name="Detail">In words.</param>
public sealed record KeyReused(string Detail) : Refusal(Detail);

/// <summary>A request with the same idempotency key is being worked on.</summary>
/// <param name="Detail">In words.</param>
public sealed record InFlight(string Detail) : Refusal(Detail);

/// <summary>A fact already stands in the way: an account name in use, a database that is not empty.</summary>
/// <param name="Detail">In words.</param>
public sealed record Conflict(string Detail) : Refusal(Detail);
