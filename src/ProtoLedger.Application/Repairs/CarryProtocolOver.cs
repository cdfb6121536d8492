using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Repair;

namespace ProtoLedger.Application.Repairs;

/// <summary>Which contrasts to keep when a protocol is copied to another scanner.</summary>
/// <param name="State">Proposal or stored version.</param>
/// <param name="FromScanner">Scanner on which the contrasts are as wanted.</param>
/// <param name="ToScanner">Scanner to which it is copied.</param>
/// <param name="Contrasts">Observables at the nominal point; at least one.</param>
/// <param name="Tolerance">Greatest difference that counts as kept; null for 5 % of the original, at least 0.03.</param>
public sealed record CarryOverQuestion(
    ProtocolChoice State, string FromScanner, string ToScanner, IReadOnlyList<ObservableKey> Contrasts, double? Tolerance);

/// <summary>Parameters that keep chosen contrasts on another scanner, or the statement that none does.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="clock">Clock.</param>
public sealed class CarryProtocolOver(Commands commands, DocumentShelf shelf, TimeProvider clock)
{
    private static readonly CommandKind Kind = new("carry-protocol-over", Rule);

    /// <summary>Who may ask.</summary>
    public static RoleRule Rule => RoleRule.SignedIn;

    /// <summary>Searches.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="question">What to keep.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Outcome<CarryOverResult>> RunAsync(Caller caller, CarryOverQuestion question, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(question);
        var loaded = await commands.ReadAsync(
            caller, Kind, question.ToScanner, stores => ProtocolStates.LoadAsync(stores, shelf, question.State, clock.Now(), cancellationToken), cancellationToken);
        if (!loaded.Succeeded)
            return loaded.Refusal;
        var (from, to) = (loaded.Value.On(question.FromScanner, "/fromScanner"), loaded.Value.On(question.ToScanner, "/toScanner"));
        if (!from.Succeeded)
            return from.Refusal;
        if (!to.Succeeded)
            return to.Refusal;
        var series = loaded.Value.Document.Series.Select(s => s.Id).ToArray();
        if (question.Contrasts.FirstOrDefault(key => !series.Contains(key.Series)) is { } unknown)
            return Invalid.Field("/contrasts", unknown.ToString(), string.Join(", ", series), "The protocol has no such series.");
        try
        {
            return CarryOver.Find(
                new VersionEvaluation(), from.Value, to.Value, question.Contrasts, null, question.Tolerance is { } tolerance ? _ => tolerance : null);
        }
        catch (ArgumentException refused)
        {
            return Invalid.Field("/contrasts", null, "observables that can be predicted on the scanner of origin", refused.Message);
        }
    }
}
