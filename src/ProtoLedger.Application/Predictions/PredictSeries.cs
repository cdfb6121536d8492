using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;

namespace ProtoLedger.Application.Predictions;

/// <summary>Predicts a series for tissues and field points, with the newest catalogue where tissues are named.</summary>
/// <param name="transactions">Where the catalogue is kept.</param>
public sealed class PredictSeries(ITransactions transactions)
{
    private const int MostCatalogues = 100;

    /// <summary>Who may ask.</summary>
    public static RoleRule Rule => RoleRule.SignedIn;

    /// <summary>Answers a question.</summary>
    /// <param name="question">The question.</param>
    /// <param name="cancellationToken">Gives up.</param>
    /// <returns>The signals, or <see cref="Invalid"/> with the pointer of what cannot be predicted.</returns>
    public async Task<Outcome<PredictionAnswer>> RunAsync(PredictionQuestion question, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(question);
        var catalogues = question.Tissues.OfType<TissueChoice.Named>().Any() ? await CataloguesAsync(cancellationToken) : [];
        var tissues = new List<Tissue>();
        var errors = new List<FieldError>();
        foreach (var choice in question.Tissues)
        {
            switch (choice)
            {
                case TissueChoice.Given(var tissue, _):
                    tissues.Add(tissue);
                    break;
                case TissueChoice.Named named:
                    Resolve(named, question, catalogues, tissues, errors);
                    break;
            }
        }

        return errors.Count > 0
            ? new Invalid("Not every tissue is known.", errors)
            : Predict(question, tissues);
    }

    private static Outcome<PredictionAnswer> Predict(PredictionQuestion question, List<Tissue> tissues)
    {
        try
        {
            var lanes = LaneTable.FromGrid(tissues, question.Conditions);
            var signals = SignalPredictor.Predict(question.Series, question.Setting, lanes, PredictionOutputs.AllEchoes);
            return new PredictionAnswer(ModelIdentity.Current, tissues, signals);
        }
        catch (ArgumentException refused)
        {
            return Invalid.Field("/series", null, "what the model covers", refused.Message);
        }
    }

    private static void Resolve(
        TissueChoice.Named named, PredictionQuestion question, IReadOnlyList<CatalogueDocument> catalogues, List<Tissue> tissues, List<FieldError> errors)
    {
        var results = catalogues
            .Select(c => CatalogueMapping.Map(c, named.Name, question.AgeGroup, question.Setting.FieldStrength, pointer: named.Pointer))
            .ToList();
        if (results.OfType<MappingResult<TissueDistribution>.Mapped>().FirstOrDefault() is { } found)
            tissues.Add(found.Value.Mean);
        else if (results.OfType<MappingResult<TissueDistribution>.Refused>().FirstOrDefault() is { } refused)
            errors.AddRange(refused.Errors.Select(e => new FieldError(e.Pointer, e.Value, e.Limit ?? "", e.Detail)));
        else
            errors.Add(new FieldError(named.Pointer, named.Name, "a tissue with its values", "No catalogue is stored, so a name says nothing."));
    }

    private async Task<IReadOnlyList<CatalogueDocument>> CataloguesAsync(CancellationToken cancellationToken)
    {
        var stored = await transactions.ReadAsync(
            stores => stores.Documents.NewestOfEachAsync(DocumentKind.Catalogue, null, MostCatalogues, cancellationToken), cancellationToken);
        return [.. stored
            .Select(version => DocumentReader.ReadJson(version.Bytes, DocumentKind.Catalogue))
            .OfType<ParseResult.Parsed>()
            .Select(parsed => (CatalogueDocument)parsed.Document)];
    }
}
