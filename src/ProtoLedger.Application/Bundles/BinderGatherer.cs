using System.Globalization;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Model.Binders;

namespace ProtoLedger.Application.Bundles;

/// <summary>Gathers what the binder's pages say.</summary>
internal sealed class BinderGatherer(IStores stores, DocumentShelf shelf, BundleScope scope, CancellationToken cancellationToken)
{
    private const int MostChanges = 40;
    private static readonly string[] InTables = ["version-imported", "version-approved", "effective", SignatureFacts.Type, LoadedFacts.Type, "proposal-imported"];
    private Dictionary<string, string> scanners = [];

    /// <summary>The binder.</summary>
    public async Task<Binder> GatherAsync(
        string site, string madeBy, DateTime now, CheckpointRow checkpoint, DateTimeOffset? firstRecord, IReadOnlyList<BundledFile> files)
    {
        var request = scope.Request;
        scanners = (await stores.Documents.NewestOfEachAsync(DocumentKind.Scanner, null, int.MaxValue, cancellationToken))
            .ToDictionary(version => version.Key.Id, version => shelf.Read(version).Title);
        var protocols = (await stores.Documents.AllAsync(DocumentKind.Protocol, cancellationToken)).Where(version => scope.Concerns(version.Key.Kind, version.Key.Id)).ToList();
        var loadings = (await stores.Records.LoadedAsync(cancellationToken)).Where(Concerns).ToList();
        return new Binder(
            new BinderIdentity(
                site, request.Protocol, request.Scanner, new DateTimeOffset(request.From), new DateTimeOffset(request.Until), new DateTimeOffset(now),
                madeBy, checkpoint.Size, Convert.ToHexStringLower(checkpoint.Root), firstRecord),
            await EffectiveAsync(protocols),
            [.. (await LogAsync(files)).OrderBy(entry => entry.At)],
            await SignaturesAsync(files),
            [.. loadings.Select(row => new LoadingLine(row.Protocol, row.Version, Scanner(row.Scanner), row.Step, row.Account, new DateTimeOffset(row.At)))],
            [.. scope.Leaves.Where(pair => !InTables.Contains(pair.Leaf.Type))
                .Select(pair => new FactLine(pair.Sequence, pair.Leaf.Time, pair.Leaf.Type, pair.Leaf.Actor, pair.Leaf.Subject))],
            Gaps(loadings.Count, firstRecord),
            [.. files.Select(file => new BinderFile(file.Name, file.What, file.Hash.ToString()))]);
    }

    private bool Concerns(LoadedRow row) =>
        scope.Concerns(DocumentKind.Protocol, row.Protocol) && (scope.Request.Scanner is null || row.Scanner == scope.Request.Scanner);

    private string Scanner(string id) => scanners.GetValueOrDefault(id, id);

    private async Task<IReadOnlyList<EffectiveLine>> EffectiveAsync(List<StoredVersion> protocols)
    {
        var lines = new List<EffectiveLine>();
        foreach (var versions in protocols.GroupBy(version => version.Key))
        {
            var known = versions.ToDictionary(version => version.Version);
            lines.AddRange((await stores.Facts.IntervalsAsync(versions.Key, cancellationToken))
                .Where(interval => interval.From < scope.Request.Until && (interval.Until is null || interval.Until > scope.Request.From))
                .Where(interval => scope.Request.Scanner is null || interval.Scanner == scope.Request.Scanner)
                .Select(interval => new EffectiveLine(
                    versions.Key.Id, shelf.Read(known[interval.Version]).Title, interval.Version, interval.Scanner, Scanner(interval.Scanner),
                    new DateTimeOffset(interval.From), interval.Until is { } until ? new DateTimeOffset(until) : null, interval.RecordedBy, interval.Imported,
                    Convert.ToHexStringLower(known[interval.Version].Sha256))));
        }

        return lines;
    }

    private async Task<List<LogEntry>> LogAsync(IReadOnlyList<BundledFile> files)
    {
        var reports = files.Where(file => file.Request != 0).ToDictionary(file => file.Request, file => file.Name);
        var log = new List<LogEntry>();
        foreach (var row in scope.Requests)
        {
            var signers = (await stores.ChangeRequests.SignaturesAsync(row.Id, cancellationToken)).Where(signature => signature.Round == row.Round).Select(signature => signature.SignerName);
            var decided = row.State == ChangeRequestState.Approved ? string.Join(", ", signers) : row.DecidedBy ?? "";
            log.Add(new LogEntry(
                row.Id.ToString(CultureInfo.InvariantCulture), row.Key.KindWord, row.Key.Id, new DateTimeOffset(row.DecidedAt ?? row.SubmittedAt ?? row.CreatedAt),
                await ChangesAsync(row.Key, row.BaseVersion, row.Bytes), row.Reason, $"{row.AuthorName} ({row.Author})", row.State.ToWord(), row.Version, decided,
                row.DecisionReason ?? "", reports.GetValueOrDefault(row.Id)));
        }

        foreach (var kind in Enum.GetValues<DocumentKind>())
        {
            foreach (var version in await stores.Documents.AllAsync(kind, cancellationToken))
            {
                if (!version.Imported || !scope.Concerns(kind, version.Key.Id))
                    continue;
                log.Add(new LogEntry(
                    "", version.Key.KindWord, version.Key.Id, new DateTimeOffset(version.StatedTime!.Value),
                    await ChangesAsync(version.Key, version.BaseVersion, version.Bytes), version.Reason, version.Author, "imported", version.Version, "", "", null));
            }
        }

        return log;
    }

    private async Task<IReadOnlyList<string>> ChangesAsync(DocumentKey key, int baseVersion, byte[] bytes)
    {
        if (baseVersion == 0 || await stores.Documents.FindAsync(key, baseVersion, cancellationToken) is not { } stood)
            return ["new document"];
        var changes = DocumentDifference.Between(stood.Bytes, bytes).Changes;
        var words = changes.Take(MostChanges)
            .Select(change => change.SeriesTitle is { } series ? $"{series}: {PlainWords.Change(change)}" : PlainWords.Change(change))
            .ToList();
        if (changes.Count > MostChanges)
            words.Add($"and {changes.Count - MostChanges} more");
        return words;
    }

    private async Task<IReadOnlyList<SignatureLine>> SignaturesAsync(IReadOnlyList<BundledFile> files)
    {
        var byHash = files.ToLookup(file => file.Hash.ToString(), file => file.Name);
        var revoked = (await stores.Keys.RevocationsAsync(cancellationToken)).ToDictionary(row => Convert.ToHexStringLower(row.CertificateSha256), row => row.RevokedAt);
        var lines = new List<SignatureLine>();
        foreach (var row in scope.Requests)
        {
            foreach (var signature in await stores.ChangeRequests.SignaturesAsync(row.Id, cancellationToken))
            {
                var certificate = Convert.ToHexStringLower(signature.CertificateSha256);
                var state = signature.Round != row.Round ? "dropped: the content changed afterwards"
                    : revoked.TryGetValue(certificate, out var at) ? $"counts; its certificate was revoked later, {VersionFacts.Time(at)}"
                    : "counts";
                var file = byHash[Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(signature.Cms))].FirstOrDefault() ?? "";
                lines.Add(new SignatureLine(
                    row.Id.ToString(CultureInfo.InvariantCulture), signature.SignerName, signature.Signer, signature.Role, signature.Meaning,
                    new DateTimeOffset(signature.Time), state, certificate, file));
            }
        }

        return lines;
    }

    private List<string> Gaps(int loadings, DateTimeOffset? firstRecord)
    {
        var gaps = new List<string>();
        if (loadings == 0)
            gaps.Add("No loading at a console is recorded: what the scanners held is not known from this record.");
        if (scope.Leaves.Any(pair => pair.Leaf.Type == "version-imported"))
            gaps.Add("Versions marked imported were stated by earlier records and are not signed here.");
        if (firstRecord is { } first && new DateTimeOffset(scope.Request.From) < first)
            gaps.Add($"Nothing was recorded by this program before {VersionFacts.Time(first.UtcDateTime)}.");
        gaps.Add("Periodic reviews, acknowledgements and checks of exams are not recorded by this version of the program.");
        return gaps;
    }
}
