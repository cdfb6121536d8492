using System.Globalization;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Runs;

internal static class RunEndpoints
{
    internal static IEndpointRouteBuilder MapRuns(this IEndpointRouteBuilder routes)
    {
        var group = routes.MapGroup("/api/v1/runs").WithTags("Regression runs");
        group.MapGet("", ListAsync).WithName("ListRuns").WithSummary("Runs, newest first").Needs(ReadRuns.Rule).Refuses(Problems.MalformedRequest);
        group.MapPost("", StartAsync).WithName("StartRun").WithSummary("Recompute every stored version").Needs(EnqueueRun.Rule).NeedsIdempotencyKey();
        group.MapGet("/{id:long}", GetAsync).WithName("GetRun").WithSummary("A run with its counts").Needs(ReadRuns.Rule).Refuses(Problems.Missing);
        group.MapGet("/{id:long}/progress", ProgressAsync).WithName("GetRunProgress").WithSummary("How far a run is").Needs(ReadRuns.Rule).Refuses(Problems.Missing);
        group.MapGet("/{id:long}/findings", FindingsAsync).WithName("GetRunFindings").WithSummary("What a completed run found against the run before it")
            .Needs(CompareRuns.Rule).Refuses(Problems.Missing, Problems.StillComputing);
        group.MapGet("/{from:long}/compare/{to:long}", CompareAsync).WithName("CompareRuns").WithSummary("What differs between two runs")
            .Needs(CompareRuns.Rule).Refuses(Problems.Missing, Problems.Clash);
        return routes;
    }

    private static async Task<Results<Ok<PageResponse<RunResponse>>, Problem>> ListAsync(
        HttpContext context, Caller caller, ReadRuns useCase, string? before, string? limit, CancellationToken cancellationToken)
    {
        var query = new Query();
        var most = (int)(query.Number("limit", limit, 1, Paging.MostItems) ?? Paging.UsualItems);
        var key = query.Number("before", before, 1, long.MaxValue);
        query.Demand();
        var page = await useCase.ListAsync(caller, key, most, cancellationToken);
        if (page.Succeeded && page.Value.Count == most)
            Paging.AddNext(context, "before", page.Value[^1].Id.ToString(CultureInfo.InvariantCulture));
        return page.ToOk(items => new PageResponse<RunResponse>([.. items.Select(RunResponse.From)]));
    }

    private static async Task<Results<Accepted<StartedRunResponse>, Problem>> StartAsync(Caller caller, EnqueueRun useCase, CancellationToken cancellationToken)
    {
        var outcome = await useCase.RunAsync(caller, RunCause.Manual, cancellationToken);
        return outcome.Succeeded
            ? TypedResults.Accepted(string.Create(CultureInfo.InvariantCulture, $"/api/v1/runs/{outcome.Value}"), new StartedRunResponse(outcome.Value))
            : Problems.From(outcome.Refusal);
    }

    private static async Task<Results<Ok<RunResponse>, Problem>> GetAsync(Caller caller, ReadRuns useCase, long id, CancellationToken cancellationToken) =>
        (await useCase.GetAsync(caller, id, cancellationToken)).ToOk(RunResponse.From);

    private static async Task<Results<Ok<RunProgress>, Problem>> ProgressAsync(Caller caller, ReadRuns useCase, long id, CancellationToken cancellationToken) =>
        (await useCase.ProgressAsync(caller, id, cancellationToken)).ToOk();

    private static async Task<Results<Ok<RunFindings>, Problem>> FindingsAsync(Caller caller, CompareRuns useCase, long id, CancellationToken cancellationToken) =>
        (await useCase.FindingsAsync(caller, id, cancellationToken)).ToOk();

    private static async Task<Results<Ok<ComparisonResponse>, Problem>> CompareAsync(
        Caller caller, CompareRuns useCase, long from, long to, CancellationToken cancellationToken) =>
        (await useCase.RunAsync(caller, from, to, cancellationToken)).ToOk(ComparisonResponse.Of);
}

/// <summary>What differs between two runs.</summary>
/// <param name="From">The earlier run.</param>
/// <param name="To">The later run.</param>
/// <param name="Compared">Results that both hold.</param>
/// <param name="OnlyFrom">Results that only the earlier holds.</param>
/// <param name="OnlyTo">Results that only the later holds.</param>
/// <param name="Moved">Results whose numbers moved, most moved first.</param>
/// <param name="NewlyFailing">Expectations that fail in the later run only.</param>
/// <param name="NewlyHolding">Expectations that hold in the later run only.</param>
internal sealed record ComparisonResponse(
    RunResponse From, RunResponse To, int Compared, int OnlyFrom, int OnlyTo,
    IReadOnlyList<MovedVersion> Moved, IReadOnlyList<ChangedVerdict> NewlyFailing, IReadOnlyList<ChangedVerdict> NewlyHolding)
{
    public static ComparisonResponse Of(RunComparison comparison) => new(
        RunResponse.From(comparison.From), RunResponse.From(comparison.To), comparison.Compared, comparison.OnlyFrom, comparison.OnlyTo,
        comparison.Moved, comparison.NewlyFailing, comparison.NewlyHolding);
}

/// <summary>A run that was queued.</summary>
/// <param name="Id">Its number.</param>
internal sealed record StartedRunResponse(long Id);

/// <summary>A regression run with its counts.</summary>
/// <param name="Id">Number.</param>
/// <param name="Cause">Why it was started.</param>
/// <param name="ChangeRequestId">The request whose submission or approval started it.</param>
/// <param name="QueuedAt">UTC.</param>
/// <param name="FinishedAt">UTC.</param>
/// <param name="State">queued, running, completed or failed.</param>
/// <param name="ModelId">The model that computed it.</param>
/// <param name="Versions">Stored protocol versions recomputed.</param>
/// <param name="Proposals">Proposals under review recomputed.</param>
/// <param name="Results">Result rows.</param>
/// <param name="Shared">Results that shared one computation with another.</param>
/// <param name="Moved">Versions whose prediction changed although their document did not.</param>
/// <param name="NewlyFailing">Expectations that newly fail.</param>
/// <param name="NewlyHolding">Expectations that newly hold.</param>
/// <param name="FailedShards">Parts that could not be computed.</param>
/// <param name="DurationMs">Milliseconds since the start, or from start to end.</param>
internal sealed record RunResponse(
    long Id, RunCause Cause, long? ChangeRequestId, DateTime QueuedAt, DateTime? FinishedAt, string State, string? ModelId, int Versions, int Proposals,
    int Results, int Shared, int Moved, int NewlyFailing, int NewlyHolding, int FailedShards, long DurationMs)
{
    public static RunResponse From(RunView run) => new(
        run.Id, run.Cause, run.ChangeRequestId, run.QueuedAt, run.FinishedAt, run.Summary.State, run.Summary.ModelId, run.Summary.Versions, run.Summary.Proposals,
        run.Summary.Results, run.Summary.Shared, run.Summary.Moved, run.Summary.NewlyFailing, run.Summary.NewlyHolding, run.Summary.FailedShards, run.Summary.DurationMs);
}
