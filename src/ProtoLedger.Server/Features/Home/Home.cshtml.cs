using System.Text.Json.Nodes;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Stores;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Home;

/// <summary>The front door: what waits for this person.</summary>
internal sealed class HomeModel(ReadChangeRequests requests) : LedgerPage
{
    public static RoleRule Rule => ReadChangeRequests.Rule;

    public IReadOnlyList<Waiting> ToDecide { get; private set; } = [];

    public IReadOnlyList<ChangeRequestView> Own { get; private set; } = [];

    /// <summary>Whether requests wait for roles of this person.</summary>
    public bool Decides => RoleRule.Decline.Allows(Actor) || ToDecide.Count > 0;

    public bool Proposes => RoleRule.Propose.Allows(Actor);

    public bool Reviews => Actor.Roles.Contains(Roles.Reviewer);

    public async Task OnGetAsync()
    {
        var waiting = new List<Waiting>();
        foreach (var request in await ListAsync(new ChangeRequestFilter(ChangeRequestState.UnderReview, Limit: 30)))
        {
            if (WaitsForMe(request))
                waiting.Add(new Waiting(request, await WorstAsync(request)));
        }

        ToDecide = waiting;

        if (Proposes)
            Own = await ListAsync(new ChangeRequestFilter(Author: Actor.Name, Limit: 12));
    }

    private bool WaitsForMe(ChangeRequestView request) =>
        request.Author != Actor.Name
        && (RoleRule.Decline.Allows(Actor)
            || request.RequiredSignatures.Any(needed => Actor.Roles.Contains(needed.Role) || needed.Deputies.Contains(Actor.Name)));

    private async Task<IReadOnlyList<ChangeRequestView>> ListAsync(ChangeRequestFilter filter) =>
        (await requests.ListAsync(Caller, filter, Cancellation)).Value ?? [];

    private async Task<WorstEffect?> WorstAsync(ChangeRequestView request)
    {
        if (!request.ReportReady)
            return null;
        var report = await requests.ReportAsync(Caller, request.Id, ReportForm.Json, Cancellation);
        var finding = report.Succeeded ? JsonNode.Parse(report.Value)?["content"]?["findings"]?.AsArray().FirstOrDefault() : null;
        return finding?["sentence"]?.GetValue<string>() is { } sentence ? new WorstEffect(finding["transition"]?.GetValue<string>(), sentence) : null;
    }
}

/// <summary>A request that waits for a decision.</summary>
internal sealed record Waiting(ChangeRequestView Request, WorstEffect? Worst);

/// <summary>The first finding of a report.</summary>
internal sealed record WorstEffect(string? Transition, string Sentence);
