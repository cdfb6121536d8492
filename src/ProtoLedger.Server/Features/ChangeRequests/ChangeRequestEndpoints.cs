using System.Globalization;
using System.Text.Json;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.ChangeRequests;

internal static class ChangeRequestEndpoints
{
    private const string Folder = "/api/v1/change-requests";

    internal static IEndpointRouteBuilder MapChangeRequests(this IEndpointRouteBuilder routes)
    {
        var group = routes.MapGroup(Folder).WithTags("Change requests");
        group.MapGet("", ListAsync).WithName("ListChangeRequests").WithSummary("List change requests, newest first")
            .Needs(ReadChangeRequests.Rule).Refuses(Problems.MalformedRequest, Problems.InvalidContent);
        group.MapPost("", ProposeAsync).WithName("Propose").WithSummary("Propose a document")
            .Needs(CreateChangeRequest.Rule).NeedsIdempotencyKey()
            .Takes<ProposeRequest>("""{"kind":"protocol","id":"brain-standard","baseVersion":3,"document":{"format":1,"kind":"protocol","id":"brain-standard"},"reason":"Shorter examination"}""")
            .Refuses(Problems.Missing, Problems.BaseHasMoved, Problems.InvalidContent, Problems.Clash);
        group.MapGet("/{id:long}", GetAsync).WithName("GetChangeRequest").WithSummary("Read a change request with its document")
            .Needs(ReadChangeRequests.Rule).Refuses(Problems.Missing);
        group.MapPut("/{id:long}", EditAsync).WithName("EditChangeRequest").WithSummary("Change the proposed document")
            .Needs(EditChangeRequest.Rule).NeedsIfMatch()
            .Takes<EditRequest>("""{"document":{"format":1,"kind":"protocol","id":"brain-standard"},"reason":"Inversion time moved to the null"}""")
            .Refuses(Problems.Missing, Problems.WrongState, Problems.BaseHasMoved, Problems.InvalidContent, Problems.Clash);
        group.MapPost("/{id:long}/submit", SubmitAsync).WithName("Submit").WithSummary("Submit for review; a regression run starts")
            .Needs(SubmitChangeRequest.Rule).IsStep().Refuses(Problems.BaseHasMoved, Problems.InvalidContent);
        group.MapPost("/{id:long}/withdraw", WithdrawAsync).WithName("Withdraw").WithSummary("Withdraw an own request")
            .Needs(WithdrawChangeRequest.Rule).IsStep().Takes<ReasonRequest>("""{"reason":"Superseded by another proposal"}""").Refuses(Problems.InvalidContent);
        group.MapPost("/{id:long}/decline", DeclineAsync).WithName("Decline").WithSummary("Decline a request")
            .Needs(DeclineChangeRequest.Rule).IsStep().Takes<ReasonRequest>("""{"reason":"Fluid is no longer dark"}""").Refuses(Problems.InvalidContent);
        group.MapPost("/{id:long}/approve", ApproveAsync).WithName("Approve").WithSummary("Sign a request; the last signature that is needed makes the version")
            .Needs(ApproveChangeRequest.Rule).IsStep().Takes<ApproveRequest>("""{"passphrase":"sign correct horse","meaning":"approved"}""")
            .Refuses(Problems.CannotBeSigned, Problems.StillComputing, Problems.BaseHasMoved, Problems.InvalidContent, Problems.AccountLocked);
        group.MapPost("/{id:long}/rebase", RebaseAsync).WithName("Rebase").WithSummary("Put a request on the newest version")
            .Needs(RebaseChangeRequest.Rule).IsStep().Refuses(Problems.BaseHasMoved, Problems.InvalidContent);
        group.MapPost("/{id:long}/effective", MakeEffectiveAsync).WithName("MakeEffective").WithSummary("Make the approved version effective, now or later")
            .Needs(MakeEffective.Rule).IsStep().Takes<EffectiveRequest>("""{"scanners":["linden-3t"]}""").Refuses(Problems.InvalidContent);
        group.MapGet("/{id:long}/comments", CommentsAsync).WithName("ListComments").WithSummary("Remarks on a request, oldest first")
            .Needs(ReadChangeRequests.Rule).Refuses(Problems.Missing);
        group.MapPost("/{id:long}/comments", CommentAsync).WithName("AddComment").WithSummary("Add a remark")
            .Needs(AddComment.Rule).NeedsIdempotencyKey().Takes<CommentRequest>("""{"text":"Have you seen this on a volunteer?","pointer":"/series/0/readout/RepetitionTime"}""")
            .Refuses(Problems.Missing, Problems.InvalidContent);
        return routes;
    }

    private static RouteHandlerBuilder IsStep(this RouteHandlerBuilder route) =>
        route.NeedsIfMatch().NeedsIdempotencyKey().Refuses(Problems.Missing, Problems.WrongState, Problems.Clash);

    private static async Task<Results<Ok<PageResponse<ChangeRequestView>>, Problem>> ListAsync(
        HttpContext context, Caller caller, ReadChangeRequests useCase, string? state, string? kind, string? document, string? author, string? before, string? limit, CancellationToken cancellationToken)
    {
        var query = new Query();
        var filter = new ChangeRequestFilter(
            query.OneOf("state", state, ChangeRequestStates.All, word => (ChangeRequestState?)ChangeRequestStates.FromWord(word)),
            document is null ? null : new DocumentKey(query.OneOf("kind", kind, DocumentKinds.Words, DocumentKey.KindOf) ?? DocumentKind.Protocol, document),
            author,
            query.Number("before", before, 1, long.MaxValue),
            (int)(query.Number("limit", limit, 1, Paging.MostItems) ?? Paging.UsualItems));
        query.Demand();
        var page = await useCase.ListAsync(caller, filter, cancellationToken);
        if (page.Succeeded && page.Value.Count == filter.Limit)
            Paging.AddNext(context, "before", page.Value[^1].Id.ToString(CultureInfo.InvariantCulture));
        return page.ToOk(items => new PageResponse<ChangeRequestView>(items));
    }

    private static async Task<Results<Created<ChangeRequestView>, Problem>> ProposeAsync(
        HttpContext context, Caller caller, CreateChangeRequest useCase, Body<ProposeRequest> body, CancellationToken cancellationToken)
    {
        var (kind, id, baseVersion, document, reason) = body.Value;
        var outcome = await useCase.RunAsync(caller, new NewChangeRequest(kind, id, baseVersion, Bytes(document), reason), cancellationToken);
        if (!outcome.Succeeded)
            return Problems.From(outcome.Refusal);
        Tag(context, outcome.Value);
        return TypedResults.Created(string.Create(CultureInfo.InvariantCulture, $"{Folder}/{outcome.Value.Id}"), outcome.Value);
    }

    private static async Task<Results<Ok<ChangeRequestResponse>, Problem>> GetAsync(
        HttpContext context, Caller caller, ReadChangeRequests useCase, long id, CancellationToken cancellationToken)
    {
        var outcome = await useCase.GetAsync(caller, id, cancellationToken);
        if (outcome.Succeeded)
            Tag(context, outcome.Value.Request);
        return outcome.ToOk(ChangeRequestResponse.From);
    }

    private static async Task<Results<Ok<ChangeRequestView>, Problem>> EditAsync(
        HttpContext context, Caller caller, EditChangeRequest useCase, long id, Body<EditRequest> body, CancellationToken cancellationToken) =>
        Stepped(context, await useCase.RunAsync(
            caller, new EditedChangeRequest(id, EntityTags.Expected(context.Request), Bytes(body.Value.Document), body.Value.Reason), cancellationToken));

    private static async Task<Results<Ok<ChangeRequestView>, Problem>> SubmitAsync(
        HttpContext context, Caller caller, SubmitChangeRequest useCase, long id, CancellationToken cancellationToken) =>
        Stepped(context, await useCase.RunAsync(caller, new ChangeRequestStep(id, EntityTags.Expected(context.Request)), cancellationToken));

    private static async Task<Results<Ok<ChangeRequestView>, Problem>> WithdrawAsync(
        HttpContext context, Caller caller, WithdrawChangeRequest useCase, long id, Body<ReasonRequest> body, CancellationToken cancellationToken) =>
        Stepped(context, await useCase.RunAsync(caller, new ReasonedStep(id, EntityTags.Expected(context.Request), body.Value.Reason), cancellationToken));

    private static async Task<Results<Ok<ChangeRequestView>, Problem>> DeclineAsync(
        HttpContext context, Caller caller, DeclineChangeRequest useCase, long id, Body<ReasonRequest> body, CancellationToken cancellationToken) =>
        Stepped(context, await useCase.RunAsync(caller, new ReasonedStep(id, EntityTags.Expected(context.Request), body.Value.Reason), cancellationToken));

    private static async Task<Results<Ok<ChangeRequestView>, Problem>> ApproveAsync(
        HttpContext context, Caller caller, ApproveChangeRequest useCase, long id, Body<ApproveRequest> body, CancellationToken cancellationToken) =>
        Stepped(context, await useCase.RunAsync(
            caller, new Approval(id, EntityTags.Expected(context.Request), body.Value.Passphrase, body.Value.Meaning), cancellationToken));

    private static async Task<Results<Ok<ChangeRequestView>, Problem>> RebaseAsync(
        HttpContext context, Caller caller, RebaseChangeRequest useCase, long id, CancellationToken cancellationToken) =>
        Stepped(context, await useCase.RunAsync(caller, new ChangeRequestStep(id, EntityTags.Expected(context.Request)), cancellationToken));

    private static async Task<Results<Ok<ChangeRequestView>, Problem>> MakeEffectiveAsync(
        HttpContext context, Caller caller, MakeEffective useCase, long id, Body<EffectiveRequest> body, CancellationToken cancellationToken) =>
        Stepped(context, await useCase.RunAsync(
            caller, new Effectiveness(id, EntityTags.Expected(context.Request), body.Value.At?.UtcDateTime, body.Value.Scanners), cancellationToken));

    private static async Task<Results<Ok<PageResponse<CommentView>>, Problem>> CommentsAsync(
        Caller caller, ReadChangeRequests useCase, long id, CancellationToken cancellationToken) =>
        (await useCase.CommentsAsync(caller, id, cancellationToken)).ToOk(comments => new PageResponse<CommentView>(comments));

    private static async Task<Results<Created<CommentView>, Problem>> CommentAsync(
        Caller caller, AddComment useCase, long id, Body<CommentRequest> body, CancellationToken cancellationToken)
    {
        var outcome = await useCase.RunAsync(caller, new NewComment(id, body.Value.Pointer, body.Value.Text), cancellationToken);
        return outcome.Succeeded
            ? TypedResults.Created(string.Create(CultureInfo.InvariantCulture, $"{Folder}/{id}/comments"), outcome.Value)
            : Problems.From(outcome.Refusal);
    }

    private static Results<Ok<ChangeRequestView>, Problem> Stepped(HttpContext context, Outcome<ChangeRequestView> outcome)
    {
        if (outcome.Succeeded)
            Tag(context, outcome.Value);
        return outcome.ToOk();
    }

    private static void Tag(HttpContext context, ChangeRequestView view) => context.Response.Headers.ETag = EntityTags.Of(view.RowVersion);

    private static byte[] Bytes(JsonElement document) => JsonSerializer.SerializeToUtf8Bytes(document);
}
