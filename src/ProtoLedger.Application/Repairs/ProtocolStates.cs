using System.Globalization;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Application.Repairs;

/// <summary>A stored version or a proposal under review, with what it is predicted from today.</summary>
internal sealed class ProtocolStates
{
    private readonly RunDocuments documents;
    private readonly RunSubject subject;
    private readonly RunSubject? before;

    private ProtocolStates(RunDocuments documents, RunSubject subject, RunSubject? before) =>
        (this.documents, this.subject, this.before) = (documents, subject, before);

    /// <summary>The protocol.</summary>
    public ProtocolDocument Document => documents.Protocol(subject.Sha256).Document;

    /// <summary>Loads a proposal, or a stored version.</summary>
    /// <param name="stores">Stores.</param>
    /// <param name="shelf">Parsed documents.</param>
    /// <param name="choice">Which.</param>
    /// <param name="now">UTC.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public static async Task<Outcome<ProtocolStates>> LoadAsync(
        IStores stores, DocumentShelf shelf, ProtocolChoice choice, DateTime now, CancellationToken cancellationToken)
    {
        var plan = await RunPlanner.PlanAsync(stores, null, now, cancellationToken);
        var subject = choice.ChangeRequest is { } request
            ? plan.Subjects.FirstOrDefault(one => one.ChangeRequest == request)
            : plan.Subjects.LastOrDefault(one => one.ChangeRequest == 0 && one.Protocol == choice.Protocol && (choice.Version is null || one.Version == choice.Version));
        if (subject is null)
        {
            return choice.ChangeRequest is { } missing
                ? new NotFound(string.Create(CultureInfo.InvariantCulture, $"There is no protocol proposal {missing} under review."))
                : new NotFound($"There is no such version of protocol {choice.Protocol}.");
        }

        var stood = plan.Subjects.FirstOrDefault(one => one.ChangeRequest == 0 && one.Protocol == subject.Protocol && one.Version == subject.Before);
        var wanted = stood is null ? [subject] : (RunSubject[])[subject, stood];
        var documents = await RunDocuments.LoadAsync(stores, shelf, plan, wanted, beforeEdit: false, cancellationToken);
        return new ProtocolStates(documents, subject, stood);
    }

    /// <summary>The state on a scanner, or why there is none.</summary>
    /// <param name="scanner">Scanner, whether the protocol names it or not.</param>
    /// <param name="pointer">Where the request names it.</param>
    public Outcome<EvaluationInput> On(string scanner, string pointer) => documents.HasScanner(scanner)
        ? documents.Input(subject.Sha256, scanner)
        : Invalid.Field(pointer, scanner, "a stored scanner", "There is no such scanner.");

    /// <summary>What paired expectations compare with on that scanner, or null.</summary>
    /// <param name="scanner">A stored scanner.</param>
    public EvaluationInput? Before(string scanner) => before is null ? null : documents.Input(before.Sha256, scanner);
}

/// <summary>Names a protocol state: a proposal under review, or a stored version.</summary>
/// <param name="ChangeRequest">Proposal; null for a stored version.</param>
/// <param name="Protocol">Protocol of a stored version.</param>
/// <param name="Version">Its number; null for the newest.</param>
public sealed record ProtocolChoice(long? ChangeRequest, string? Protocol, int? Version);
