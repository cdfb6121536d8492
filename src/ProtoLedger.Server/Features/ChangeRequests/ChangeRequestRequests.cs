using System.ComponentModel.DataAnnotations;
using System.Text.Json;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Server.Features.ChangeRequests;

/// <summary>A proposal.</summary>
/// <param name="Kind">Kind of the document.</param>
/// <param name="Id">Identifier of the document.</param>
/// <param name="BaseVersion">Newest version, on which the proposal stands; 0 for a new document.</param>
/// <param name="Document">The whole proposed document.</param>
/// <param name="Reason">Why, in words.</param>
internal sealed record ProposeRequest(
    DocumentKind Kind,
    [property: StringLength(100, MinimumLength = 1)] string Id,
    [property: Range(0.0, 1_000_000.0)] int BaseVersion,
    JsonElement Document,
    [property: StringLength(4000, MinimumLength = 1)] string Reason);

/// <summary>New content of a proposal.</summary>
/// <param name="Document">The whole proposed document.</param>
/// <param name="Reason">New reason, or none to keep it.</param>
internal sealed record EditRequest(JsonElement Document, [property: StringLength(4000, MinimumLength = 1)] string? Reason = null);

/// <summary>Why a request is closed.</summary>
/// <param name="Reason">In words.</param>
internal sealed record ReasonRequest([property: StringLength(4000, MinimumLength = 1)] string? Reason = null);

/// <summary>A signature.</summary>
/// <param name="Passphrase">Signing passphrase of the person who signs; asked for at each signature.</param>
/// <param name="Meaning">What the signature means; none where the rule of the document leaves one choice.</param>
internal sealed record ApproveRequest(
    [property: StringLength(1000, MinimumLength = 1)] string Passphrase, [property: StringLength(100, MinimumLength = 1)] string? Meaning = null);

/// <summary>When and where an approved version becomes effective.</summary>
/// <param name="At">Not before now; none for now.</param>
/// <param name="Scanners">Some of the protocol's scanners; none for all.</param>
internal sealed record EffectiveRequest(DateTimeOffset? At = null, IReadOnlyList<string>? Scanners = null);

/// <summary>A remark.</summary>
/// <param name="Text">In words.</param>
/// <param name="Pointer">JSON pointer of the parameter it is about, or none for the whole request.</param>
internal sealed record CommentRequest(
    [property: StringLength(4000, MinimumLength = 1)] string Text, [property: StringLength(400)] string? Pointer = null);
