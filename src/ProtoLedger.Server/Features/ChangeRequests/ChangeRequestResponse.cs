using System.Text.Json;
using ProtoLedger.Application.ChangeRequests;

namespace ProtoLedger.Server.Features.ChangeRequests;

/// <summary>A change request with its document.</summary>
/// <param name="Request">State and people.</param>
/// <param name="Document">The proposed document.</param>
/// <param name="BaseDocument">The version on which it stands; none for a new document.</param>
internal sealed record ChangeRequestResponse(ChangeRequestView Request, JsonElement Document, JsonElement? BaseDocument)
{
    public static ChangeRequestResponse From(ChangeRequestDetail detail) => new(
        detail.Request, JsonElement.Parse(detail.Document), detail.Base is null ? null : JsonElement.Parse(detail.Base));
}
