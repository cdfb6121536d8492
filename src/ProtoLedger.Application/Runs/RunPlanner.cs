using System.Globalization;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Application.Runs;

/// <summary>Fixes what a run depends on.</summary>
internal static class RunPlanner
{
    /// <summary>The plan of a run as of now.</summary>
    /// <param name="stores">Stores.</param>
    /// <param name="changeRequestId">Request whose document stands in the baseline, or null.</param>
    /// <param name="now">UTC.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public static async Task<RunPlan> PlanAsync(IStores stores, long? changeRequestId, DateTime now, CancellationToken cancellationToken)
    {
        var request = changeRequestId is { } id ? await stores.ChangeRequests.FindAsync(id, forUpdate: false, cancellationToken) : null;
        var effective = (await stores.Facts.EffectiveAtAsync(now, cancellationToken))
            .GroupBy(interval => interval.Key)
            .ToDictionary(group => group.Key, group => group.Max(interval => interval.Version));
        var baseline = new List<RunDocument>();
        RunDocument? replaced = null;
        foreach (var kind in Enum.GetValues<DocumentKind>().Where(kind => kind != DocumentKind.Protocol))
        {
            foreach (var versions in (await stores.Documents.AllAsync(kind, cancellationToken)).GroupBy(version => version.Key))
            {
                // A document that nobody made effective yet still counts with its newest version: there is no other.
                var current = versions.Last(version => !effective.TryGetValue(version.Key, out var number) || version.Version == number);
                var entry = Entry(current.Key, current.Version, current.Sha256);
                if (request?.Key == current.Key && request.State == ChangeRequestState.UnderReview)
                    (replaced, entry) = (entry, Entry(request.Key, 0, request.Sha256));
                baseline.Add(entry);
            }
        }

        if (request is { State: ChangeRequestState.UnderReview, BaseVersion: 0 } && request.Key.Kind != DocumentKind.Protocol)
            baseline.Add(Entry(request.Key, 0, request.Sha256));
        var substituted = request is not null && request.Key.Kind != DocumentKind.Protocol ? request.Id : (long?)null;
        var plan = SamplePlan.Default;
        return new RunPlan(
            1, plan.Samples, plan.Seed.ToString(CultureInfo.InvariantCulture), baseline, replaced, substituted,
            await SubjectsAsync(stores, cancellationToken));
    }

    private static async Task<IReadOnlyList<RunSubject>> SubjectsAsync(IStores stores, CancellationToken cancellationToken)
    {
        var subjects = (await stores.Documents.AllAsync(DocumentKind.Protocol, cancellationToken))
            .Select(version => new RunSubject(version.Key.Id, version.Version, 0, version.Version - 1, Hex(version.Sha256)))
            .ToList();
        foreach (var row in await UnderReviewAsync(stores, cancellationToken))
            subjects.Add(new RunSubject(row.Key.Id, 0, row.Id, row.BaseVersion, Hex(row.Sha256)));
        return subjects;
    }

    private static async Task<IReadOnlyList<ChangeRequestRow>> UnderReviewAsync(IStores stores, CancellationToken cancellationToken)
    {
        var rows = new List<ChangeRequestRow>();
        foreach (var id in await stores.ChangeRequests.UnderReviewAsync(cancellationToken))
            if (await stores.ChangeRequests.FindAsync(id, forUpdate: false, cancellationToken) is { Key.Kind: DocumentKind.Protocol, State: ChangeRequestState.UnderReview } row)
                rows.Add(row);
        return rows;
    }

    private static RunDocument Entry(DocumentKey key, int version, byte[] sha256) => new(key.KindWord, key.Id, version, Hex(sha256));

    private static string Hex(byte[] hash) => Convert.ToHexStringLower(hash);
}
