using System.Text.Json.Serialization;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Signatures;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>A signature on a request.</summary>
/// <param name="Id">Request.</param>
/// <param name="ExpectedRowVersion">Row version that the client read.</param>
/// <param name="Passphrase">The signer's signing passphrase; never kept.</param>
/// <param name="Meaning">approved, clinically accepted or ready to load; null for the one that the signer's role still owes.</param>
public sealed record Approval(long Id, long ExpectedRowVersion, [property: JsonIgnore] string Passphrase, string? Meaning = null);

/// <summary>
/// Signs a request. When every required signature is there, the next immutable version is made in the same transaction.
/// </summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="ledger">Records it.</param>
/// <param name="signing">Opens the signer's key.</param>
public sealed class ApproveChangeRequest(Commands commands, DocumentShelf shelf, LedgerWriter ledger, SigningKeys signing)
{
    private static readonly CommandKind Kind = new("approve-change-request", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Sign;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who signs: not the author; a session, never a token.</param>
    /// <param name="approval">Which request, with the passphrase.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Outcome<ChangeRequestView>> RunAsync(Caller caller, Approval approval, CancellationToken cancellationToken)
    {
        var outcome = await commands.WriteAsync(
            caller, Kind, Proposals.Subject(approval.Id), approval, command => SignAsync(command, approval), cancellationToken);
        if (outcome.Refusal is CannotSign)
            await signing.CountFailureAsync(caller, cancellationToken);
        return outcome;
    }

    private async Task<Outcome<ChangeRequestView>> SignAsync(Command command, Approval approval)
    {
        var (row, refusal) = await Proposals.TakeAsync(command, approval.Id, approval.ExpectedRowVersion, "approve", ChangeRequestState.UnderReview);
        if (row is null)
            return refusal!;
        var document = shelf.Read(row.Sha256, row.Bytes);
        var given = (await command.Stores.ChangeRequests.SignaturesAsync(row.Id, command.Cancellation)).ToList();
        var counting = given.Where(signature => signature.Round == row.Round).ToList();
        var required = await row.RequiredAsync(command.Stores, shelf, command.Cancellation);
        var (owed, notAllowed) = Owed(command.Actor, row, required, counting, approval.Meaning);
        if (owed is null)
            return notAllowed!;
        if (await command.Stores.ChangeRequests.FindReportAsync(row.Id, row.Sha256, row.Round, command.Cancellation) is not { } report || report.RunId != row.RunId)
            return new NotReady($"The report on change request {row.Id} is not finished: wait for run {row.RunId}.", row.RunId);
        var (key, cannot) = await signing.OpenAsync(command, approval.Passphrase);
        if (key is null)
            return cannot!;
        using (key.Value.Key)
        {
            // From here on nothing else is appended, so that the base and the checkpoint stay what they are.
            var checkpoint = await ledger.CurrentAsync(command);
            if (await Proposals.BaseAsync(command, row.Key, row.BaseVersion, row.Id) is { } moved)
                return moved;
            if (await Proposals.FitsAsync(command, shelf, document) is { } unfit)
                return unfit;
            if (await OutdatedAsync(command, row) is { } outdated)
                return outdated;
            var signature = Sign(command, row, report, given.Count + 1, owed, key.Value, checkpoint);
            await command.Stores.ChangeRequests.AddSignatureAsync(signature, command.Cancellation);
            return await FinishAsync(command, row, required, report, [.. counting, signature], key.Value.Certificate);
        }
    }

    /// <summary>
    /// Refused when a document that was dated ahead has come into force since the report's run: the report was computed from others.
    /// (What becomes effective at once restarts every review by itself.)
    /// </summary>
    private static async Task<Refusal?> OutdatedAsync(Command command, ChangeRequestRow row)
    {
        var run = await command.Stores.Runs.FindAsync(row.RunId!.Value, command.Cancellation);
        var later = (await command.Stores.Facts.EffectiveAtAsync(command.Now, command.Cancellation))
            .FirstOrDefault(interval => interval.Key.Kind != DocumentKind.Protocol && interval.From > run!.QueuedAt);
        return later is null
            ? null
            : new Conflict(
                $"Version {later.Version} of {later.Key} came into force after the report on change request {row.Id} was computed: its author saves the proposal once more, so that it is computed anew.");
    }

    /// <summary>The signature that the actor may give and that is still owed.</summary>
    private static (RequiredSignature? Owed, Refusal? Refusal) Owed(
        Actor actor, ChangeRequestRow row, IReadOnlyList<RequiredSignature> required, List<SignatureRow> given, string? meaning)
    {
        if (actor.Name == row.Author)
            return (null, new Forbidden($"{actor.Name} wrote change request {row.Id}; authors never approve their own."));
        if (given.Exists(signature => signature.Signer == actor.Name))
            return (null, new Conflict($"{actor.Name} signed change request {row.Id} already."));
        var words = meaning?.Replace('-', ' ');
        var open = required
            .Where(wanted => !given.Exists(signature => signature.Role == wanted.Role && signature.Meaning == Words(wanted)))
            .Where(wanted => actor.Roles.Contains(wanted.Role) || wanted.Deputies.Contains(actor.Name))
            .Where(wanted => words is null || Words(wanted) == words)
            .ToList();
        if (open.Count > 0)
            return (open[0], null);
        var needed = string.Join(", ", required.Select(wanted => $"{wanted.Role} \"{Words(wanted)}\""));
        return (null, new Forbidden($"Change request {row.Id} needs {needed}; nothing of that is {actor.Name}'s to give now."));
    }

    /// <summary>The signed record: the version that approval makes.</summary>
    private static string Subject(ChangeRequestRow row) => VersionFacts.Subject(row.Key, row.BaseVersion + 1);

    private static string Words(RequiredSignature wanted) => wanted.Meaning.Replace('-', ' ');

    private static SignatureRow Sign(
        Command command, ChangeRequestRow row, ReportRow report, int number, RequiredSignature owed, OpenedKey key, Checkpoint checkpoint)
    {
        var meaning = SignatureMeanings.FromWords(Words(owed))
            ?? throw new InvalidOperationException($"'{owed.Meaning}' is no meaning of a signature.");
        var manifest = new SignatureManifest(
            Subject(row),
            key.Certificate.Subject,
            owed.Role,
            meaning,
            new DateTimeOffset(command.Now),
            key.Certificate.Fingerprint,
            report.ModelId,
            new Dictionary<string, Digest>(StringComparer.Ordinal)
            {
                ["report.json"] = new(report.JsonSha256),
                ["report.md"] = new(report.MarkdownSha256),
                ["report.html"] = new(report.HtmlSha256),
                ["document.json"] = new(row.Sha256),
                ["inputs.json"] = new(report.InputsSha256),
            },
            checkpoint);
        return new SignatureRow(
            row.Id, number, row.Round, command.Actor.Name, key.Certificate.Subject.DisplayName, owed.Role, meaning.ToWords(), command.Now,
            key.Certificate.Fingerprint.ToArray(), manifest.ToBytes(), key.Key.Sign(manifest, key.Certificate));
    }

    private async Task<Outcome<ChangeRequestView>> FinishAsync(
        Command command, ChangeRequestRow row, IReadOnlyList<RequiredSignature> required, ReportRow report, List<SignatureRow> counting, SigningCertificate certificate)
    {
        var facts = new List<Fact> { SignatureFacts.Of(counting[^1], Subject(row), certificate.ToDer()) };
        var complete = required.All(
            wanted => counting.Exists(signature => signature.Role == wanted.Role && signature.Meaning == Words(wanted)));
        var kept = row;
        if (complete)
        {
            var version = new StoredVersion(
                row.Key, row.BaseVersion + 1, row.Bytes, row.Sha256, row.BaseVersion, command.Now, command.Actor.Name, row.Author, row.Reason,
                row.Id, Imported: false, StatedTime: null, Source: null, SourceSha256: null);
            await command.Stores.Documents.AddAsync(version, command.Cancellation);
            kept = row with
            {
                State = ChangeRequestState.Approved, DecidedAt = command.Now, DecidedBy = command.Actor.Name, Version = version.Version,
            };
            facts.Add(VersionFacts.Of(version, await ReportBlobsAsync(command, report)));
            facts.Add(Proposals.Fact("change-request-approved", kept));
            await command.Stores.Runs.EnqueueAsync(RunCause.Approve, null, RunPriority.Decision, command.Now, command.Cancellation);
        }

        await ledger.AppendAsync(command, [.. facts]);
        return await Proposals.KeepAsync(command, shelf, kept);
    }

    private static async Task<(string Name, byte[] Bytes)[]> ReportBlobsAsync(Command command, ReportRow report)
    {
        var blobs = new List<(string, byte[])>();
        foreach (var (name, hash) in new[] { ("report.json", report.JsonSha256), ("report.md", report.MarkdownSha256), ("report.html", report.HtmlSha256), ("inputs.json", report.InputsSha256) })
            blobs.Add((name, (await command.Stores.Ledger.FindBlobAsync(hash, command.Cancellation))!));
        return [.. blobs];
    }
}
