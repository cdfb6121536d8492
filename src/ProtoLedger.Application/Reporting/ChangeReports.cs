using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports;

namespace ProtoLedger.Application.Reporting;

/// <summary>Makes the change report of a proposal at the end of its run. The bytes are made once, stored, signed, never made again.</summary>
/// <param name="transactions">Transactions.</param>
/// <param name="shelf">Documents.</param>
public sealed class ChangeReports(ITransactions transactions, DocumentShelf shelf)
{
    /// <summary>The report; null when the run is for no proposal, or its content has changed since.</summary>
    internal async Task<FinishedReport?> MakeAsync(
        RunRow run, RunPlan plan, RunFindings findings, DateTime now, CancellationToken cancellationToken)
    {
        var material = await transactions.ReadAsync(stores => LoadAsync(stores, run, plan, findings, cancellationToken), cancellationToken);
        if (material is null)
            return null;
        var evaluation = new VersionEvaluation();
        var assessed = material.Edits
            .Select(edit => new AssessedProtocol(edit, ChangeAssessor.Assess(evaluation, edit.Scanners)))
            .ToList();
        var rendered = ReportRenderer.Render(new ReportAssembly(material, assessed, evaluation, run, findings, now).Assemble());
        return new FinishedReport(material.Request, run, plan.ToBytes(), rendered, now);
    }

    private async Task<ReportMaterial?> LoadAsync(
        IStores stores, RunRow run, RunPlan plan, RunFindings findings, CancellationToken cancellationToken)
    {
        if (run.ChangeRequestId is not { } id
            || await stores.ChangeRequests.FindAsync(id, forUpdate: false, cancellationToken) is not { State: ChangeRequestState.UnderReview } request
            || request.RunId != run.Id)
            return null;
        var touched = Touched(plan, request, findings);
        var wanted = plan.Subjects.Where(subject => touched.Contains(subject.Protocol)).ToList();
        var before = await RunDocuments.LoadAsync(stores, shelf, plan, wanted, beforeEdit: true, cancellationToken);
        var after = await RunDocuments.LoadAsync(stores, shelf, plan, wanted, beforeEdit: false, cancellationToken);
        var effective = (await stores.Facts.EffectiveAtAsync(run.StartedAt ?? run.QueuedAt, cancellationToken))
            .Where(interval => interval.Key.Kind == DocumentKind.Protocol)
            .ToList();
        var edits = request.Key.Kind == DocumentKind.Protocol
            ? [OfProtocol(request, wanted, before, after)]
            : OfBaseline(wanted, touched, effective, before, after);
        var protocols = new List<(StoredVersion Version, ProtocolDocument Document)>();
        foreach (var version in await stores.Documents.NewestOfEachAsync(DocumentKind.Protocol, null, int.MaxValue, cancellationToken))
            protocols.Add((version, (ProtocolDocument)shelf.Read(version)));
        var stood = request.BaseVersion == 0 ? null : await stores.Documents.FindAsync(request.Key, request.BaseVersion, cancellationToken);
        return new ReportMaterial(request, shelf.Read(request.Sha256, request.Bytes), stood, plan, edits, effective, protocols);
    }

    /// <summary>Protocols that the report speaks of in full: the edited one, or those whose newest version an edited document moves.</summary>
    private static HashSet<string> Touched(RunPlan plan, ChangeRequestRow request, RunFindings findings)
    {
        if (request.Key.Kind == DocumentKind.Protocol)
            return [request.Key.Id];
        var newest = plan.Subjects.GroupBy(subject => subject.Protocol).ToDictionary(group => group.Key, group => group.Max(subject => subject.Version));
        return [.. findings.Moved.Select(moved => moved.Result)
            .Concat(findings.NewlyFailing.Select(verdict => verdict.Result))
            .Concat(findings.NewlyHolding.Select(verdict => verdict.Result))
            .Where(result => newest.GetValueOrDefault(result.Protocol) == result.Version)
            .Select(result => result.Protocol)];
    }

    private static ProtocolEdit OfProtocol(ChangeRequestRow request, List<RunSubject> subjects, RunDocuments before, RunDocuments after)
    {
        var proposal = subjects.Single(subject => subject.ChangeRequest == request.Id);
        var stood = subjects.FirstOrDefault(subject => subject.ChangeRequest == 0 && subject.Version == request.BaseVersion) ?? proposal;
        var document = after.Protocol(proposal.Sha256).Document;
        return new ProtocolEdit(
            document,
            request.BaseVersion,
            [.. document.Scanners.Select(scanner => new EditOnScanner(before.Input(stood.Sha256, scanner), after.Input(proposal.Sha256, scanner)))]);
    }

    private static List<ProtocolEdit> OfBaseline(
        List<RunSubject> subjects, HashSet<string> touched, List<EffectiveInterval> effective, RunDocuments before, RunDocuments after)
    {
        var edits = new List<ProtocolEdit>();
        foreach (var protocol in touched.Order(StringComparer.Ordinal))
        {
            var stored = subjects.Where(subject => subject.Protocol == protocol && subject.ChangeRequest == 0).ToDictionary(subject => subject.Version);
            var running = effective.Where(interval => interval.Key.Id == protocol).ToDictionary(interval => interval.Scanner, interval => interval.Version);
            var newest = stored[stored.Keys.Max()];
            var document = after.Protocol(newest.Sha256).Document;
            edits.Add(new ProtocolEdit(
                document,
                newest.Version,
                [.. document.Scanners.Select(scanner =>
                {
                    var subject = stored[running.GetValueOrDefault(scanner, newest.Version)];
                    return new EditOnScanner(before.Input(subject.Sha256, scanner), after.Input(subject.Sha256, scanner));
                })]));
        }

        return edits;
    }
}

/// <summary>An edit of one protocol, or of a document that moves it, on every scanner.</summary>
/// <param name="Document">The protocol after the edit.</param>
/// <param name="Version">Version that it stands on.</param>
/// <param name="Scanners">Before and after on each scanner.</param>
internal sealed record ProtocolEdit(ProtocolDocument Document, int Version, IReadOnlyList<EditOnScanner> Scanners);

/// <summary>What an edit does to one protocol.</summary>
/// <param name="Edit">The edit.</param>
/// <param name="Assessment">What it does.</param>
internal sealed record AssessedProtocol(ProtocolEdit Edit, ChangeAssessment Assessment);

/// <summary>Everything that a report is made from.</summary>
/// <param name="Request">The request.</param>
/// <param name="Document">The proposed document.</param>
/// <param name="Base">Base version, or null for a new document.</param>
/// <param name="Plan">What the run depended on.</param>
/// <param name="Edits">Protocols that it moves.</param>
/// <param name="Effective">What protocols were effective when the run started.</param>
/// <param name="Protocols">Newest version of every protocol.</param>
internal sealed record ReportMaterial(
    ChangeRequestRow Request,
    LedgerDocument Document,
    StoredVersion? Base,
    RunPlan Plan,
    IReadOnlyList<ProtocolEdit> Edits,
    IReadOnlyList<EffectiveInterval> Effective,
    IReadOnlyList<(StoredVersion Version, ProtocolDocument Document)> Protocols);

/// <summary>A report on its way into the store.</summary>
internal sealed record FinishedReport(ChangeRequestRow Request, RunRow Run, byte[] Inputs, RenderedReport Rendered, DateTime Now)
{
    /// <summary>Stores the bytes and what they belong to.</summary>
    public async Task StoreAsync(IStores stores, CancellationToken cancellationToken)
    {
        var ledger = stores.Ledger;
        await stores.ChangeRequests.AddReportAsync(
            new ReportRow(
                Request.Id, Request.Sha256, Request.Round, Run.Id, Run.ModelId!,
                await ledger.AddBlobAsync(Rendered.Json, cancellationToken),
                await ledger.AddBlobAsync(Rendered.Markdown, cancellationToken),
                await ledger.AddBlobAsync(Rendered.Html, cancellationToken),
                await ledger.AddBlobAsync(Inputs, cancellationToken),
                Now),
            cancellationToken);
    }
}
