using System.Globalization;
using System.Text.Json.Nodes;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Application.Reporting;

/// <summary>Puts the report model together from what the run and the assessment found. It adds no judgement of its own.</summary>
internal sealed partial class ReportAssembly(
    ReportMaterial material, IReadOnlyList<AssessedProtocol> assessed, VersionEvaluation evaluation, RunRow run, RunFindings findings, DateTime now)
{
    private bool Several => assessed.Count > 1;

    /// <summary>The model.</summary>
    public ChangeReport Assemble() => new(
        Identity(),
        [.. assessed.SelectMany(FindingsOf)],
        [.. assessed.SelectMany(BalanceOf)],
        Changes(),
        [.. Scanners()],
        Variants(),
        [.. assessed.SelectMany(one => one.Assessment.LeftOut).DistinctBy(note => note.Effect).Select(note => new OmissionNote(note.Effect, note.Text, note.Because))],
        [.. assessed.SelectMany(one => one.Assessment.NextSteps).Distinct().Select(step => new ReportStep(step.What, step.Where, step.ByWhom, step.When))],
        [.. assessed.SelectMany(AppearancesOf)],
        [.. assessed.SelectMany(EffectsOf)],
        [.. assessed.SelectMany(AttributionsOf)],
        [.. assessed.SelectMany(VerdictsOf)],
        [.. assessed.SelectMany(RecoveryOf)],
        [.. assessed.SelectMany(MapsOf)],
        [.. assessed.SelectMany(RepairsOf)],
        new ReportRun(run.Versions, run.Proposals, run.Results, run.Shared, run.Moved, run.NewlyFailing, run.NewlyHolding, run.FailedShards),
        [.. findings.Moved.Select(Touched).OfType<TouchedVersion>()],
        [.. Assumptions()],
        Cautions());

    private ReportIdentity Identity()
    {
        var request = material.Request;
        var hashes = new List<NamedHash>();
        if (material.Base is { } stood)
            hashes.Add(new NamedHash($"base version {stood.Version}", Hex(stood.Sha256)));
        hashes.Add(new NamedHash("proposed document", Hex(request.Sha256)));
        hashes.AddRange(material.Plan.Baseline.Where(entry => entry.Version > 0)
            .Select(entry => new NamedHash($"{entry.Kind} {entry.Id}, version {entry.Version}", entry.Sha256)));
        return new ReportIdentity(
            request.Id.ToString(CultureInfo.InvariantCulture), request.Key.KindWord, request.Key.Id, material.Document.Title,
            request.BaseVersion == 0 ? null : request.BaseVersion, request.BaseVersion + 1, request.Author, request.AuthorName, request.Reason,
            new DateTimeOffset(request.SubmittedAt ?? request.CreatedAt), new DateTimeOffset(now),
            run.Id.ToString(CultureInfo.InvariantCulture), run.ModelId!, hashes);
    }

    private IEnumerable<ScannerSummary> Scanners()
    {
        foreach (var group in assessed.SelectMany(one => one.Edit.Scanners.Select(edit => (One: one, Edit: edit))).GroupBy(pair => pair.Edit.After.Scanner.Document.Id))
        {
            var scanner = group.First().Edit.After.Scanner.Document;
            var parts = group.Select(pair => pair.One.Assessment.Scanners.First(found => found.ScannerId == scanner.Id)).ToList();
            var transitions = parts.SelectMany(part => part.Difference.Transitions).ToList();
            int Count(Transition transition) => transitions.Count(change => change.Transition == transition);
            yield return new ScannerSummary(
                scanner.Id, scanner.Title, scanner.MagneticFieldStrength, scanner.Location,
                Count(Transition.NewlyFails), Count(Transition.NewlyUncertain), Count(Transition.StillFails), Count(Transition.NewlyHolds),
                Count(Transition.StillHolds), parts.Sum(part => part.After.Expectations.Count), parts.All(SlicesFit));
        }
    }

    private static bool SlicesFit(ScannerAssessment part) =>
        !part.After.Observables.Select((key, i) => (key, i)).Any(pair => pair.key.Observable == "slicesFit" && part.After.Nominal[pair.i] == 0);

    private IReadOnlyList<UnchangedVariant> Variants()
    {
        if (material.Document is not ProtocolDocument edited)
            return [];
        return [.. material.Protocols
            .Where(other => other.Document.Id != edited.Id
                && (other.Document.VariantOf == edited.Id || (edited.VariantOf is { } origin && (other.Document.Id == origin || other.Document.VariantOf == origin))))
            .Select(other => new UnchangedVariant(other.Document.Id, other.Document.Title, other.Version.Version, Why(other.Version, other.Document, edited)))];
    }

    /// <summary>How a protocol belongs to the edited one, and which of the edited values it keeps.</summary>
    private string Why(StoredVersion version, ProtocolDocument other, ProtocolDocument edited)
    {
        var bond = other.VariantOf == edited.Id ? $"variant of {edited.Id}"
            : other.Id == edited.VariantOf ? $"{edited.Id} is a variant of it"
            : $"variant of {other.VariantOf} as well";
        var kept = Kept(version, other);
        return kept.Count == 0 ? $"{bond}; it keeps its own values" : $"{bond}; keeps {string.Join(", ", kept)}";
    }

    /// <summary>Values of the same series at the places that the edit set, up to five.</summary>
    private List<string> Kept(StoredVersion version, ProtocolDocument other)
    {
        if (material.Base is not { } stood)
            return [];
        var tree = JsonNode.Parse(version.Bytes);
        var kept = new List<string>();
        foreach (var change in DocumentDifference.Between(stood.Bytes, material.Request.Bytes).Changes.Where(change => change is { Kind: ChangeKind.Set, SeriesId: not null, New: JsonValue }))
        {
            var index = other.Series.Select(series => series.Id).ToList().IndexOf(change.SeriesId!);
            var below = change.Pointer.Split('/', 4);
            if (index < 0 || below is not ["", "series", _, var rest] || !JsonPointer.TryFind(tree, $"/series/{index}/{rest}", out var value) || value is not JsonValue)
                continue;
            kept.Add($"{change.Keyword ?? change.Label} {PlainWords.Setting(value)}{(change.Unit is { Length: > 0 } unit ? " " + unit : "")}");
            if (kept.Count == 5)
                break;
        }

        return kept;
    }

    /// <summary>A moved version in words; proposals and the edited document itself are told elsewhere.</summary>
    private TouchedVersion? Touched(MovedVersion moved)
    {
        var protocol = material.Protocols.FirstOrDefault(candidate => candidate.Document.Id == moved.Result.Protocol);
        if (protocol.Document is null || moved.Before is not { } before || moved.After is not { } after)
            return null;
        var key = ObservableKey.Parse(moved.Largest);
        var effective = material.Effective.Any(interval =>
            interval.Key.Id == moved.Result.Protocol && interval.Version == moved.Result.Version && interval.Scanner == moved.Result.Scanner);
        return new TouchedVersion(
            moved.Result.Protocol, protocol.Document.Title, moved.Result.Version, moved.Result.Scanner, effective, key.Observable,
            Words(key.Tissue), Words(key.Reference), before, after, Unit(key.Observable),
            findings.NewlyFailing.Count(verdict => verdict.Result == moved.Result));
    }

    private IEnumerable<Assumption> Assumptions()
    {
        var results = assessed.SelectMany(one => one.Assessment.Scanners).SelectMany(part => new[] { part.Before, part.After }).ToList();
        foreach (var text in results.SelectMany(result => result.Assumptions).Distinct())
            yield return new Assumption(text, "", "the documents leave it open", Weak: false);
        foreach (var weak in results.SelectMany(result => result.WeakSources).Distinct())
            yield return new Assumption($"{weak.Parameter} of {Words(weak.Tissue)}", "catalogue value", weak.Source, Weak: true);
    }

    private List<string> Cautions()
    {
        var cautions = assessed
            .SelectMany(one => one.Assessment.Scanners.SelectMany(part => part.After.NotPredictable.Select(missing => missing.Because)))
            .Distinct()
            .Select(because => $"Not predicted: {because}")
            .ToList();
        if (material.Base is null)
            cautions.Insert(0, "This document is new: there is nothing to compare it with, and no finding says better or worse.");
        if (assessed.Count == 0)
            cautions.Insert(0, "No stored protocol version is moved by this edit.");
        return cautions;
    }

    private static string Hex(byte[] hash) => Convert.ToHexStringLower(hash);
}
