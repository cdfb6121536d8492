using System.Globalization;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Runs;

/// <summary>Reads regression runs.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="clock">Clock.</param>
public sealed class ReadRuns(Commands commands, TimeProvider clock)
{
    private static readonly CommandKind Kind = new("read-runs", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.SignedIn;

    /// <summary>One run with its counts.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="id">Number.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<RunView>> GetAsync(Caller caller, long id, CancellationToken cancellationToken) =>
        commands.ReadAsync<RunView>(
            caller, Kind, Subject(id), async stores => await stores.Runs.FindAsync(id, cancellationToken) is { } run ? View(run) : Missing(id), cancellationToken);

    /// <summary>Runs, newest first.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="before">Number to start below, or null.</param>
    /// <param name="limit">Most entries, 1 to 200.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<RunView>>> ListAsync(Caller caller, long? before, int limit, CancellationToken cancellationToken) =>
        commands.ReadAsync(
            caller,
            Kind,
            "runs",
            async stores => limit is < 1 or > 200
                ? Invalid.Field("/limit", limit.ToString(CultureInfo.InvariantCulture), "1 to 200", "A page has at most 200 entries.")
                : Outcome.Done<IReadOnlyList<RunView>>([.. (await stores.Runs.ListAsync(before, limit, cancellationToken)).Select(View)]),
            cancellationToken);

    /// <summary>How far a run is.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="id">Number.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<RunProgress>> ProgressAsync(Caller caller, long id, CancellationToken cancellationToken) =>
        commands.ReadAsync<RunProgress>(
            caller,
            Kind,
            Subject(id),
            async stores => await stores.Runs.FindAsync(id, cancellationToken) is null ? Missing(id) : await stores.Runs.ProgressAsync(id, cancellationToken),
            cancellationToken);

    /// <summary>Name of a run.</summary>
    internal static string Subject(long id) => $"run/{id}";

    /// <summary>No such run.</summary>
    internal static NotFound Missing(long id) => new($"There is no run {id}.");

    private RunView View(RunRow run)
    {
        var duration = run.StartedAt is { } start && run.FinishedAt is { } end ? (long)(end - start).TotalMilliseconds : 0;
        if (run is { StartedAt: { } began, FinishedAt: null })
            duration = (long)(clock.Now() - began).TotalMilliseconds;
        return new RunView(
            run.Id, run.Cause, run.ChangeRequestId, run.QueuedAt, run.FinishedAt,
            new RunSummary(
                run.State.ToString().ToLowerInvariant(), run.ModelId, run.Versions, run.Proposals, run.Results, run.Shared, run.Moved,
                run.NewlyFailing, run.NewlyHolding, run.FailedShards, duration));
    }
}
