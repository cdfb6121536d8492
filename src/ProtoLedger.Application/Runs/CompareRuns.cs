using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Application.Runs;

/// <summary>What differs between two runs.</summary>
/// <param name="From">The older run.</param>
/// <param name="To">The newer run.</param>
/// <param name="Compared">Results that both hold.</param>
/// <param name="OnlyFrom">Results that only the older holds.</param>
/// <param name="OnlyTo">Results that only the newer holds.</param>
/// <param name="Moved">Results whose numbers moved, most moved first; at most 1,000.</param>
/// <param name="NewlyFailing">Verdicts that fail in the newer only.</param>
/// <param name="NewlyHolding">Verdicts that hold in the newer only.</param>
public sealed record RunComparison(
    RunView From,
    RunView To,
    int Compared,
    int OnlyFrom,
    int OnlyTo,
    IReadOnlyList<MovedVersion> Moved,
    IReadOnlyList<ChangedVerdict> NewlyFailing,
    IReadOnlyList<ChangedVerdict> NewlyHolding);

/// <summary>Compares two completed runs, and reads what one run found.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="runs">Reads runs.</param>
public sealed class CompareRuns(Commands commands, ReadRuns runs)
{
    private const int MostMoved = 1000;
    private static readonly CommandKind Kind = new("compare-runs", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.SignedIn;

    /// <summary>What differs between two runs.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="from">Older run.</param>
    /// <param name="to">Newer run.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Outcome<RunComparison>> RunAsync(Caller caller, long from, long to, CancellationToken cancellationToken)
    {
        var old = await runs.GetAsync(caller, from, cancellationToken);
        if (!old.Succeeded)
            return old.Refusal;
        var now = await runs.GetAsync(caller, to, cancellationToken);
        if (!now.Succeeded)
            return now.Refusal;
        return await commands.ReadAsync<RunComparison>(
            caller, Kind, $"{ReadRuns.Subject(from)} {ReadRuns.Subject(to)}", stores => CompareAsync(stores, old.Value, now.Value, cancellationToken), cancellationToken);
    }

    /// <summary>What a completed run found against the run before it.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="id">Run.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<RunFindings>> FindingsAsync(Caller caller, long id, CancellationToken cancellationToken) =>
        commands.ReadAsync<RunFindings>(
            caller,
            Kind,
            ReadRuns.Subject(id),
            async stores =>
            {
                if (await stores.Runs.FindAsync(id, cancellationToken) is not { } run)
                    return ReadRuns.Missing(id);
                return run.FindingsSha256 is null
                    ? new NotReady($"Run {id} is {run.State.ToString().ToLowerInvariant()}.", id)
                    : RunFindings.Parse((await stores.Ledger.FindBlobAsync(run.FindingsSha256, cancellationToken))!);
            },
            cancellationToken);

    private static async Task<Outcome<RunComparison>> CompareAsync(IStores stores, RunView from, RunView to, CancellationToken cancellationToken)
    {
        var packed = new PackedResults(stores, cancellationToken);
        var old = (await stores.Runs.ResultsAsync(from.Id, null, cancellationToken)).ToDictionary(ResultName.Of);
        var (moved, failing, holding) = (new List<MovedVersion>(), new List<ChangedVerdict>(), new List<ChangedVerdict>());
        var (compared, onlyTo) = (0, 0);
        foreach (var row in await stores.Runs.ResultsAsync(to.Id, null, cancellationToken))
        {
            var name = ResultName.Of(row);
            if (!old.Remove(name, out var earlier))
            {
                onlyTo++;
                continue;
            }

            compared++;
            if (await packed.UnpackAsync(earlier) is not { } before || await packed.UnpackAsync(row) is not { } after)
                return new Conflict($"A stored result of run {from.Id} or {to.Id} was altered and cannot be read; run the audit.");
            if (ResultComparison.Moved(name, before, after) is { } change)
                moved.Add(change);
            foreach (var (transition, verdict) in ResultComparison.Verdicts(name, before, after))
                (transition == Transition.NewlyFails ? failing : holding).Add(verdict);
        }

        return new RunComparison(
            from, to, compared, old.Count, onlyTo, [.. moved.OrderByDescending(entry => entry.Observables).Take(MostMoved)], failing, holding);
    }
}
