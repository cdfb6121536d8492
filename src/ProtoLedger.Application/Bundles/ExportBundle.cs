using System.Globalization;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Site;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Bundles;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Signatures;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Reports;

namespace ProtoLedger.Application.Bundles;

/// <summary>What a bundle is about.</summary>
/// <param name="Protocol">Only this protocol, or null for all.</param>
/// <param name="Scanner">Only this scanner, or null for all.</param>
/// <param name="From">Begin of the period, UTC.</param>
/// <param name="Until">End of the period, UTC, after its begin.</param>
public sealed record BundleRequest(string? Protocol, string? Scanner, DateTime From, DateTime Until);

/// <summary>A bundle that is ready to be written.</summary>
/// <param name="FileName">Name for a download.</param>
/// <param name="WriteAsync">Writes the zip to a stream that need not seek.</param>
public sealed record PreparedBundle(string FileName, Func<Stream, CancellationToken, Task> WriteAsync);

/// <summary>Gathers the binder for people and the proofs behind it.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="transactions">Fetches contents while the zip is written.</param>
/// <param name="keys">The site's keys.</param>
/// <param name="shelf">Documents.</param>
/// <param name="site">The site.</param>
/// <param name="clock">Clock.</param>
public sealed class ExportBundle(
    Commands commands, ITransactions transactions, SiteKeys keys, DocumentShelf shelf, SiteOptions site, TimeProvider clock)
{
    private static readonly CommandKind Kind = new("export-bundle", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Export;

    /// <summary>Prepares a bundle; the export is an event of the audit trail.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="request">What it is about.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Outcome<PreparedBundle>> RunAsync(Caller caller, BundleRequest request, CancellationToken cancellationToken)
    {
        if (request.Until <= request.From)
            return Invalid.Field("/to", VersionFacts.Time(UtcTime.Cut(request.Until)), $"after {VersionFacts.Time(UtcTime.Cut(request.From))}", "The period ends before it begins.");
        var outcome = await commands.ReadAsync(
            caller, Kind, Scope(request), stores => PrepareAsync(stores, caller, request, cancellationToken), cancellationToken);
        if (outcome.Succeeded)
            await commands.RecordAsync(caller, Kind.Action, Scope(request), "read", "", cancellationToken);
        return outcome;
    }

    private static string Scope(BundleRequest request) => string.Create(
        CultureInfo.InvariantCulture,
        $"{request.Protocol ?? "all protocols"}, {request.Scanner ?? "all scanners"}, {request.From:yyyy-MM-dd} to {request.Until:yyyy-MM-dd}");

    private async Task<Outcome<PreparedBundle>> PrepareAsync(IStores stores, Caller caller, BundleRequest request, CancellationToken cancellationToken)
    {
        if (request.Protocol is { } protocol && await stores.Documents.NewestAsync(new(DocumentKind.Protocol, protocol), cancellationToken) == 0)
            return new NotFound($"There is no protocol {protocol}.");
        if (request.Scanner is { } scanner && await stores.Documents.NewestAsync(new(DocumentKind.Scanner, scanner), cancellationToken) == 0)
            return new NotFound($"There is no scanner {scanner}.");
        if (await stores.Ledger.NewestCheckpointAsync(cancellationToken) is not { } checkpoint)
            return new NotFound("The ledger is empty.");
        var opened = await keys.OpenAsync(stores, cancellationToken);
        var leaves = (await AuditLedger.LeavesAsync(stores, cancellationToken)).Where(leaf => leaf.Sequence < checkpoint.Size).ToList();
        var parsed = leaves.Select(leaf => (leaf.Sequence, Leaf: LedgerLeaf.Parse(leaf.Bytes).Require())).ToList();
        var scope = new BundleScope(request, parsed, await stores.Records.ChangeRequestsAsync(cancellationToken));
        var now = clock.Now();
        var gatherer = new BinderGatherer(stores, shelf, scope, cancellationToken);
        var (entries, files) = await EntriesAsync(stores, scope, cancellationToken);
        var binder = await gatherer.GatherAsync(site.Name, caller.Actor.Name, now, checkpoint, parsed.Count == 0 ? null : parsed[0].Leaf.Time, files);
        entries.AddRange(BinderRenderer.Render(binder).Select(page => BundleEntry.Page(page.Name, page.Content)));
        var revocations = await Revocations.ListAsync(stores, cancellationToken);
        var issued = new DateTimeOffset(now);
        var contents = new BundleContents(
            $"{site.Name}: {request.Protocol ?? "all protocols"}", Scope(request),
            SignedNote.Parse(System.Text.Encoding.UTF8.GetBytes(checkpoint.Note)).Require(), opened.Signer.PublicKey, leaves.Select(leaf => leaf.Bytes),
            opened.Authority.Certificate, opened.Authority.IssueRevocationList(revocations, revocations.Count + 1, issued, issued.AddDays(30)), entries);
        var name = string.Create(CultureInfo.InvariantCulture, $"protoledger-{request.Protocol ?? "all"}-{now:yyyyMMdd-HHmmss}.zip");
        return new PreparedBundle(name, (output, cancellation) => BundleWriter.WriteAsync(output, contents, opened.Signer, cancellation));
    }

    /// <summary>Signatures with their signed files, reports as pages, and the contents of the leaves in scope.</summary>
    private async Task<(List<BundleEntry> Entries, IReadOnlyList<BundledFile> Files)> EntriesAsync(
        IStores stores, BundleScope scope, CancellationToken cancellationToken)
    {
        var entries = new List<BundleEntry>();
        var files = new List<BundledFile>();
        var signed = new HashSet<Digest>();
        foreach (var (sequence, leaf) in scope.Leaves.Where(pair => pair.Leaf.Type == SignatureFacts.Type))
        {
            var manifest = await ContentAsync(stores, leaf.Blobs["manifest.json"], cancellationToken);
            entries.AddRange(BundleEntry.Signature(sequence, manifest, await ContentAsync(stores, leaf.Blobs["approval.p7s"], cancellationToken)));
            signed.UnionWith([leaf.Blobs["manifest.json"], leaf.Blobs["approval.p7s"]]);
            foreach (var (name, hash) in SignatureManifest.Parse(manifest).Require().Artefacts)
            {
                entries.Add(BundleEntry.Signed(sequence, name, Fetch(hash)));
                signed.Add(hash);
            }

            files.Add(new BundledFile(BundleNames.InSignature(sequence, BundleNames.SignatureFile), "signature", leaf.Blobs["approval.p7s"]));
        }

        foreach (var request in scope.Requests)
        {
            if (await stores.ChangeRequests.FindReportAsync(request.Id, request.Sha256, request.Round, cancellationToken) is not { } report)
                continue;
            var html = await ContentAsync(stores, new Digest(report.HtmlSha256), cancellationToken);
            var page = BundleEntry.Page(string.Create(CultureInfo.InvariantCulture, $"report-{request.Id}.html"), html);
            entries.Add(page);
            files.Add(new BundledFile(page.Name, $"Report on change request {request.Id}", Digest.Of(html), request.Id));
        }

        foreach (var hash in scope.Leaves.SelectMany(pair => pair.Leaf.Blobs.Values).Distinct().Where(hash => !signed.Contains(hash)))
            entries.Add(BundleEntry.Blob(hash, Fetch(hash)));
        return (entries, files);
    }

    private Func<CancellationToken, ValueTask<byte[]>> Fetch(Digest hash) =>
        async cancellation => await transactions.ReadAsync(stores => ContentAsync(stores, hash, cancellation), cancellation);

    private static async Task<byte[]> ContentAsync(IStores stores, Digest hash, CancellationToken cancellationToken) =>
        await stores.Ledger.FindBlobAsync(hash.ToArray(), cancellationToken)
            ?? throw new InvalidOperationException($"Content {hash} is missing: run the audit.");
}
