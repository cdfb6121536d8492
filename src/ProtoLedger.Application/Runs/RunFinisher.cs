using ProtoLedger.Application.Stores;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Application.Runs;

/// <summary>Compares a computed run with the completed run before it, protocol by protocol.</summary>
internal static class RunFinisher
{
    /// <summary>The findings and the row with its final counts; the state is left to the caller.</summary>
    public static async Task<(RunFindings Findings, RunRow Counted)> FindAsync(
        IStores stores, RunRow run, RunPlan plan, RunProgress progress, CancellationToken cancellationToken)
    {
        var previous = await stores.Runs.PreviousCompletedAsync(run.Id, cancellationToken);
        var packed = new PackedResults(stores, cancellationToken);
        var (moved, failing, holding, altered) = (new List<MovedVersion>(), new List<ChangedVerdict>(), new List<ChangedVerdict>(), new List<ResultName>());
        var results = 0;
        foreach (var protocol in plan.Subjects.Select(subject => subject.Protocol).Distinct())
        {
            var rows = await stores.Runs.ResultsAsync(run.Id, protocol, cancellationToken);
            results += rows.Count;
            var old = previous is null ? [] : (await stores.Runs.ResultsAsync(previous.Id, protocol, cancellationToken)).ToDictionary(ResultName.Of);
            altered.AddRange(old.Values.Where(row => !PackedResults.IsIntact(row)).Select(ResultName.Of));
            var own = rows.ToDictionary(ResultName.Of);
            foreach (var row in rows)
            {
                var name = ResultName.Of(row);
                if (Earlier(row, old, own, plan) is not { } earlier)
                    continue;
                var now = (await packed.UnpackAsync(row))!;
                if (await packed.UnpackAsync(earlier) is not { } before)
                {
                    moved.Add(new MovedVersion(name, now.Observables.Count, now.Observables[0].ToString(), null, null));
                    continue;
                }

                if (row.ChangeRequestId == 0 && ResultComparison.Moved(name, before, now) is { } change)
                    moved.Add(change);
                foreach (var (transition, verdict) in ResultComparison.Verdicts(name, before, now))
                    (transition == Transition.NewlyFails ? failing : holding).Add(verdict);
            }
        }

        var counted = run with
        {
            Versions = plan.Subjects.Count(subject => subject.ChangeRequest == 0),
            Proposals = plan.Subjects.Count(subject => subject.ChangeRequest != 0),
            Results = results,
            Shared = progress.Shared,
            Moved = moved.Select(entry => (entry.Result.Protocol, entry.Result.Version)).Distinct().Count(),
            NewlyFailing = failing.Count,
            NewlyHolding = holding.Count,
            FailedShards = progress.Failed,
        };
        return (new RunFindings(previous?.Id, moved, failing, holding, altered), counted);
    }

    /// <summary>What a row is compared with: the same result of the run before; for a proposal seen for the first time its base version in this run.</summary>
    private static ResultRow? Earlier(ResultRow row, Dictionary<ResultName, ResultRow> old, Dictionary<ResultName, ResultRow> own, RunPlan plan)
    {
        var name = ResultName.Of(row);
        if (row.ChangeRequestId == 0)
            return old.GetValueOrDefault(name);
        if (old.TryGetValue(name, out var same) && same.DocumentSha256.AsSpan().SequenceEqual(row.DocumentSha256))
            return same;
        var subject = plan.Subjects.First(candidate => candidate.ChangeRequest == row.ChangeRequestId);
        return own.GetValueOrDefault(new ResultName(row.Protocol, subject.Before, 0, row.Scanner));
    }
}
