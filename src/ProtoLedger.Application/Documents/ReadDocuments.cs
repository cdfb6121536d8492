using System.Globalization;
using System.Text.Json.Nodes;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.Documents;

/// <summary>Answers about stored versions: what there is, what was effective when and where, why a value is what it is.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="clock">Clock.</param>
public sealed class ReadDocuments(Commands commands, DocumentShelf shelf, TimeProvider clock)
{
    private static readonly CommandKind Kind = new("read-documents", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.SignedIn;

    /// <summary>Newest version of each document of a kind, by identifier.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="kind">Kind.</param>
    /// <param name="after">Identifier to start after, or null.</param>
    /// <param name="limit">Most entries, 1 to 200.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<DocumentSummary>>> ListAsync(
        Caller caller, DocumentKind kind, string? after, int limit, CancellationToken cancellationToken) =>
        commands.ReadAsync<IReadOnlyList<DocumentSummary>>(
            caller,
            Kind,
            DocumentKey.Word(kind),
            async stores =>
            {
                if (limit is < 1 or > 200)
                    return Invalid.Field("/limit", limit.ToString(CultureInfo.InvariantCulture), "1 to 200", "A page has at most 200 entries.");
                var now = (await stores.Facts.EffectiveAtAsync(clock.Now(), cancellationToken)).ToLookup(interval => interval.Key);
                var newest = await stores.Documents.NewestOfEachAsync(kind, after, limit, cancellationToken);
                return Outcome.Done<IReadOnlyList<DocumentSummary>>(
                    [.. newest.Select(version => new DocumentSummary(version.Key.Kind, version.Key.Id, shelf.Read(version).Title, version.Version, [.. now[version.Key]]))]);
            },
            cancellationToken);

    /// <summary>All versions of a document, oldest first.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="key">Document.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<VersionSummary>>> VersionsAsync(Caller caller, DocumentKey key, CancellationToken cancellationToken) =>
        WithVersionsAsync(
            caller,
            key,
            async (stores, versions) =>
            {
                var intervals = (await stores.Facts.IntervalsAsync(key, cancellationToken)).ToLookup(interval => interval.Version);
                var summaries = new List<VersionSummary>();
                foreach (var version in versions)
                    summaries.Add(await SummaryAsync(stores, version, [.. intervals[version.Version]], cancellationToken));
                return Outcome.Done<IReadOnlyList<VersionSummary>>(summaries);
            },
            cancellationToken);

    /// <summary>One version with its bytes.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="key">Document.</param>
    /// <param name="version">Number; null for the newest.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<VersionDetail>> VersionAsync(Caller caller, DocumentKey key, int? version, CancellationToken cancellationToken) =>
        commands.ReadAsync<VersionDetail>(
            caller,
            Kind,
            key.ToString(),
            async stores =>
            {
                var number = version ?? await stores.Documents.NewestAsync(key, cancellationToken);
                if (await stores.Documents.FindAsync(key, number, cancellationToken) is not { } stored)
                    return Missing(key, version);
                var intervals = await stores.Facts.IntervalsAsync(key, cancellationToken);
                var summary = await SummaryAsync(stores, stored, [.. intervals.Where(interval => interval.Version == number)], cancellationToken);
                return new VersionDetail(summary, stored.Bytes, shelf.Read(stored));
            },
            cancellationToken);

    /// <summary>Every difference between two versions.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="key">Document.</param>
    /// <param name="from">Older version.</param>
    /// <param name="to">Newer version.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<ParameterChange>>> CompareAsync(
        Caller caller, DocumentKey key, int from, int to, CancellationToken cancellationToken) =>
        commands.ReadAsync<IReadOnlyList<ParameterChange>>(
            caller,
            Kind,
            key.ToString(),
            async stores =>
            {
                if (await stores.Documents.FindAsync(key, from, cancellationToken) is not { } old)
                    return Missing(key, from);
                if (await stores.Documents.FindAsync(key, to, cancellationToken) is not { } @new)
                    return Missing(key, to);
                return Outcome.Done(DocumentDifference.Between(old.Bytes, @new.Bytes).Changes);
            },
            cancellationToken);

    /// <summary>Which versions set a parameter, newest first, with who, when, why and what was predicted.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="key">Document.</param>
    /// <param name="version">Version to look from.</param>
    /// <param name="pointer">JSON pointer in that version.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ParameterProvenance>> ProvenanceAsync(
        Caller caller, DocumentKey key, int version, string pointer, CancellationToken cancellationToken) =>
        WithVersionsAsync<ParameterProvenance>(
            caller,
            key,
            async (stores, versions) =>
            {
                var known = versions.Where(candidate => candidate.Version <= version).ToList();
                if (known.Count == 0 || known[^1].Version != version)
                    return Missing(key, version);
                if (pointer.Length > 0 && pointer[0] != '/')
                    return Invalid.Field("/pointer", pointer, "a JSON pointer, such as /series/0/readout/RepetitionTime", "A JSON pointer begins with a slash.");
                var steps = Provenance.Trace(key.Kind, [.. known.Select(candidate => (candidate, candidate.Bytes))], pointer);
                if (steps.Count == 0)
                    return new NotFound($"Version {version} of {key} has nothing at {pointer}.");
                var intervals = (await stores.Facts.IntervalsAsync(key, cancellationToken)).ToLookup(interval => interval.Version);
                var settings = new List<ParameterSetting>();
                foreach (var step in steps)
                {
                    var summary = await SummaryAsync(stores, step.Version, [.. intervals[step.Version.Version]], cancellationToken);
                    settings.Add(new ParameterSetting(summary, step.Pointer, step.Value, await EffectAsync(stores, step.Version, cancellationToken)));
                }

                return new ParameterProvenance(key, version, pointer, Parameters.Describe(key.Kind, pointer, JsonNode.Parse(known[^1].Bytes)), settings);
            },
            cancellationToken);

    /// <summary>What was effective at a time.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="protocol">Only this protocol, or null for all.</param>
    /// <param name="scanner">Only this scanner, or null for all.</param>
    /// <param name="at">UTC; null for now.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<EffectiveAnswer>> EffectiveAsync(
        Caller caller, string? protocol, string? scanner, DateTime? at, CancellationToken cancellationToken) =>
        commands.ReadAsync<EffectiveAnswer>(
            caller,
            Kind,
            "effective",
            async stores =>
            {
                var time = UtcTime.Cut(at ?? clock.Now());
                if (protocol is not null && await stores.Documents.NewestAsync(new(DocumentKind.Protocol, protocol), cancellationToken) == 0)
                    return Missing(new(DocumentKind.Protocol, protocol), null);
                if (scanner is not null && await stores.Documents.NewestAsync(new(DocumentKind.Scanner, scanner), cancellationToken) == 0)
                    return Missing(new(DocumentKind.Scanner, scanner), null);
                var found = new List<EffectiveVersion>();
                foreach (var interval in await stores.Facts.EffectiveAtAsync(time, cancellationToken))
                {
                    if (interval.Key.Kind != DocumentKind.Protocol
                        || (protocol is not null && interval.Key.Id != protocol)
                        || (scanner is not null && interval.Scanner != scanner))
                        continue;
                    var stored = await stores.Documents.FindAsync(interval.Key, interval.Version, cancellationToken);
                    found.Add(new EffectiveVersion(interval, await SummaryAsync(stores, stored!, [interval], cancellationToken)));
                }

                return new EffectiveAnswer(time, found, found.Count == 0 ? "No record: nothing is known to have been effective there then." : null);
            },
            cancellationToken);

    private static NotFound Missing(DocumentKey key, int? version) =>
        new(version is null ? $"There is no {key}." : $"There is no version {version} of {key}.");

    private static async Task<VersionSummary> SummaryAsync(
        IStores stores, StoredVersion version, IReadOnlyList<EffectiveInterval> intervals, CancellationToken cancellationToken)
    {
        IReadOnlyList<SignatureView> signatures = [];
        if (version.ChangeRequestId is { } id && await stores.ChangeRequests.FindAsync(id, forUpdate: false, cancellationToken) is { } request)
        {
            signatures = [.. (await stores.ChangeRequests.SignaturesAsync(id, cancellationToken))
                .Where(signature => signature.Round == request.Round)
                .Select(signature => ChangeRequestViews.View(signature, request))];
        }

        return new VersionSummary(
            version.Key.Kind, version.Key.Id, version.Version, Convert.ToHexStringLower(version.Sha256), version.BaseVersion, version.Author,
            version.Reason, version.CreatedAt, version.StatedTime, version.Imported, version.Source, version.ChangeRequestId, signatures, intervals);
    }

    /// <summary>Sentences of the signed report's findings; empty for imported history.</summary>
    private static async Task<IReadOnlyList<string>> EffectAsync(IStores stores, StoredVersion version, CancellationToken cancellationToken)
    {
        if (version.ChangeRequestId is not { } id
            || await stores.ChangeRequests.FindAsync(id, forUpdate: false, cancellationToken) is not { } request
            || await stores.ChangeRequests.FindReportAsync(id, request.Sha256, request.Round, cancellationToken) is not { } report
            || await stores.Ledger.FindBlobAsync(report.JsonSha256, cancellationToken) is not { } json)
            return [];
        return [.. (JsonNode.Parse(json)?["content"]?["findings"]?.AsArray() ?? [])
            .Select(finding => finding?["sentence"]?.GetValue<string>())
            .OfType<string>()];
    }

    private Task<Outcome<T>> WithVersionsAsync<T>(
        Caller caller, DocumentKey key, Func<IStores, IReadOnlyList<StoredVersion>, Task<Outcome<T>>> answer, CancellationToken cancellationToken) =>
        commands.ReadAsync(
            caller,
            Kind,
            key.ToString(),
            async stores =>
            {
                var versions = await stores.Documents.VersionsAsync(key, cancellationToken);
                return versions.Count == 0 ? Missing(key, null) : await answer(stores, versions);
            },
            cancellationToken);
}
