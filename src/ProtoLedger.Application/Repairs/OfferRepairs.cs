using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Repair;

namespace ProtoLedger.Application.Repairs;

/// <summary>Which expectation to repair, where, and with what.</summary>
/// <param name="State">Proposal or stored version.</param>
/// <param name="Scanner">Scanner.</param>
/// <param name="Expectation">Identifier of the expectation.</param>
/// <param name="Parameters">Parameters that may change, with limits; null for the usual ones.</param>
public sealed record RepairQuestion(ProtocolChoice State, string Scanner, string Expectation, IReadOnlyList<RepairParameter>? Parameters);

/// <summary>Smallest changes that make an expectation hold, each with its cost.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="clock">Clock.</param>
public sealed class OfferRepairs(Commands commands, DocumentShelf shelf, TimeProvider clock)
{
    private static readonly CommandKind Kind = new("offer-repairs", Rule);

    /// <summary>Who may ask.</summary>
    public static RoleRule Rule => RoleRule.SignedIn;

    /// <summary>Looks for offers; an empty list where nothing within the limits makes it hold.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="question">What to repair.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Outcome<IReadOnlyList<RepairOffer>>> RunAsync(Caller caller, RepairQuestion question, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(question);
        var loaded = await commands.ReadAsync(
            caller, Kind, question.Expectation, stores => ProtocolStates.LoadAsync(stores, shelf, question.State, clock.Now(), cancellationToken), cancellationToken);
        if (!loaded.Succeeded)
            return loaded.Refusal;
        var input = loaded.Value.On(question.Scanner, "/scanner");
        if (!input.Succeeded)
            return input.Refusal;
        var known = input.Value.Expectations?.Document.Expectations.Select(e => e.Id).ToArray() ?? [];
        return known.Contains(question.Expectation)
            ? Outcome.Done(RepairSearch.Offers(new VersionEvaluation(), input.Value, loaded.Value.Before(question.Scanner), question.Expectation, question.Parameters))
            : Invalid.Field("/expectation", question.Expectation, string.Join(", ", known), "No such expectation is written for this protocol.");
    }
}
