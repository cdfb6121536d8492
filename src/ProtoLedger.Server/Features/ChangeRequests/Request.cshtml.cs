using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Reports;
using ProtoLedger.Server.Features.Documents;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.ChangeRequests;

/// <summary>One request: its report, and the decision beside it.</summary>
internal sealed class RequestModel(
    ReadChangeRequests read,
    SubmitChangeRequest submit,
    WithdrawChangeRequest withdraw,
    DeclineChangeRequest decline,
    ApproveChangeRequest approve,
    RebaseChangeRequest rebase,
    MakeEffective makeEffective,
    AddComment addComment) : LedgerPage
{
    public static RoleRule Rule => ReadChangeRequests.Rule;

    public ChangeRequestView ChangeRequest { get; private set; } = null!;

    public string Folder { get; private set; } = "";

    public string? Report { get; private set; }

    public IReadOnlyList<ParameterChange> Changes { get; private set; } = [];

    /// <summary>What would repair what the proposal breaks.</summary>
    public IReadOnlyList<RepairOffer> Repairs { get; private set; } = [];

    public IReadOnlyList<CommentView> Comments { get; private set; } = [];

    public IReadOnlyList<string> Scanners { get; private set; } = [];

    /// <summary>What this person may sign and has not signed yet.</summary>
    public IReadOnlyList<string> Meanings =>
        [.. ChangeRequest.RequiredSignatures.Where(needed => Actor.Roles.Contains(needed.Role) || needed.Deputies.Contains(Actor.Name)).Select(needed => needed.Meaning).Distinct()];

    public bool WaitsForRun => ChangeRequest is { State: ChangeRequestState.UnderReview, ReportReady: false };

    public bool MaySubmit => Owns && ChangeRequest.State == ChangeRequestState.Draft;

    public bool MayWithdraw => Owns && ChangeRequest.State is (ChangeRequestState.Draft or ChangeRequestState.UnderReview);

    public bool MayRebase => MayWithdraw && ChangeRequest.BaseVersion > 0;

    public bool MayDecline => !Owns && ChangeRequest.State == ChangeRequestState.UnderReview && DeclineChangeRequest.Rule.Allows(Actor);

    public bool MaySign => !Owns && ChangeRequest.State == ChangeRequestState.UnderReview && ApproveChangeRequest.Rule.Allows(Actor) && Meanings.Count > 0
        && !ChangeRequest.Signatures.Any(signature => signature.Current && signature.Signer == Actor.Name);

    public bool MayRelease => ChangeRequest.State == ChangeRequestState.Approved && MakeEffective.Rule.Allows(Actor);

    public bool MayComment => AddComment.Rule.Allows(Actor) && !ChangeRequest.Imported;

    private bool MayPropose => ChangeRequest is { Kind: DocumentKind.Protocol, State: ChangeRequestState.UnderReview or ChangeRequestState.Declined } && CreateChangeRequest.Rule.Allows(Actor);

    private bool Owns => ChangeRequest.Author == Actor.Name;

    public Task<IActionResult> OnGetAsync(long id) => ShowAsync(id, null);

    public Task<IActionResult> OnPostSubmitAsync(long id, long seen, string? formKey) =>
        StepAsync(id, submit.RunAsync(Sender(formKey), new ChangeRequestStep(id, seen), Cancellation));

    public Task<IActionResult> OnPostWithdrawAsync(long id, long seen, string? formKey, string? reason) =>
        StepAsync(id, withdraw.RunAsync(Sender(formKey), new ReasonedStep(id, seen, reason), Cancellation));

    public Task<IActionResult> OnPostDeclineAsync(long id, long seen, string? formKey, string? reason) =>
        StepAsync(id, decline.RunAsync(Sender(formKey), new ReasonedStep(id, seen, reason), Cancellation));

    public Task<IActionResult> OnPostRebaseAsync(long id, long seen, string? formKey) =>
        StepAsync(id, rebase.RunAsync(Sender(formKey), new ChangeRequestStep(id, seen), Cancellation));

    public Task<IActionResult> OnPostApproveAsync(long id, long seen, string? formKey, string? passphrase, string? meaning) =>
        StepAsync(id, approve.RunAsync(Sender(formKey), new Approval(id, seen, passphrase ?? "", meaning), Cancellation));

    public Task<IActionResult> OnPostEffectiveAsync(long id, long seen, string? formKey, DateTime? at, string[] scanners) =>
        StepAsync(id, makeEffective.RunAsync(
            Sender(formKey),
            new Effectiveness(id, seen, at is { } time ? DateTime.SpecifyKind(time, DateTimeKind.Utc) : null, scanners.Length == 0 ? null : scanners),
            Cancellation));

    public Task<IActionResult> OnPostCommentAsync(long id, string? formKey, string? pointer, string? text) =>
        StepAsync(id, addComment.RunAsync(Sender(formKey), new NewComment(id, string.IsNullOrEmpty(pointer) ? null : pointer, text), Cancellation));

    private async Task<IActionResult> StepAsync<T>(long id, Task<Outcome<T>> step)
    {
        var outcome = await step;
        return outcome.Succeeded ? LocalRedirect($"/requests/{id}") : await ShowAsync(id, outcome.Refusal);
    }

    private async Task<IActionResult> ShowAsync(long id, Refusal? refusal)
    {
        var found = await read.GetAsync(Caller, id, Cancellation);
        if (!found.Succeeded)
            return Absent(found.Refusal);
        ChangeRequest = found.Value.Request;
        Folder = Folders.Of(ChangeRequest.Kind);
        if (found.Value.Base is { } stood)
            Changes = DocumentDifference.Between(stood, found.Value.Document).Changes;
        if (DocumentReader.ReadJson(found.Value.Document, ChangeRequest.Kind) is ParseResult.Parsed { Document: ProtocolDocument protocol })
            Scanners = protocol.Scanners;
        Comments = (await read.CommentsAsync(Caller, id, Cancellation)).Value ?? [];
        if (ChangeRequest.ReportReady && await read.ReportAsync(Caller, id, ReportForm.Html, Cancellation) is { Succeeded: true, Value: var html })
            Report = ReportPage.Fragment(html);
        if (Report is not null && MayPropose && await read.ReportAsync(Caller, id, ReportForm.Json, Cancellation) is { Succeeded: true, Value: var json })
            Repairs = RepairOffers.Read(json, ChangeRequest.DocumentId, found.Value.Document, Changes);
        return refusal is null ? Page() : Refuse(refusal);
    }

    /// <summary>A button of the decision.</summary>
    internal sealed record StepForm(RequestModel Page, string Handler, string Label, string Look);
}
