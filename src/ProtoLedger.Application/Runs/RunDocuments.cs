using System.Globalization;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Application.Runs;

/// <summary>The parsed documents of a plan, and the inputs of evaluations made of them.</summary>
internal sealed class RunDocuments
{
    private readonly Dictionary<(DocumentKind Kind, string Id), object> baseline = [];
    private readonly Dictionary<string, HashedDocument<ProtocolDocument>> protocols;
    private readonly SamplePlan sampling;

    private RunDocuments(SamplePlan sampling, Dictionary<string, HashedDocument<ProtocolDocument>> protocols) =>
        (this.sampling, this.protocols) = (sampling, protocols);

    /// <summary>Loads the baseline and the wanted subjects.</summary>
    /// <param name="stores">Stores.</param>
    /// <param name="shelf">Parsed documents.</param>
    /// <param name="plan">The plan.</param>
    /// <param name="wanted">Subjects to load.</param>
    /// <param name="beforeEdit">True for the baseline without the substituted document.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public static async Task<RunDocuments> LoadAsync(
        IStores stores, DocumentShelf shelf, RunPlan plan, IEnumerable<RunSubject> wanted, bool beforeEdit, CancellationToken cancellationToken)
    {
        var protocols = new Dictionary<string, HashedDocument<ProtocolDocument>>(StringComparer.Ordinal);
        foreach (var hash in wanted.Select(subject => subject.Sha256).Distinct())
            protocols.Add(hash, (HashedDocument<ProtocolDocument>)await HashedAsync(stores, shelf, hash, cancellationToken));
        var documents = new RunDocuments(new SamplePlan(plan.Samples, ulong.Parse(plan.Seed, CultureInfo.InvariantCulture)), protocols);
        foreach (var entry in plan.Baseline)
        {
            var edited = entry.Version == 0;
            if (edited && beforeEdit && plan.Replaced is null)
                continue;
            var taken = edited && beforeEdit ? plan.Replaced! : entry;
            documents.baseline[(taken.KindOf, taken.Id)] = await HashedAsync(stores, shelf, taken.Sha256, cancellationToken);
        }

        return documents;
    }

    /// <summary>The protocol document of a hash.</summary>
    public HashedDocument<ProtocolDocument> Protocol(string sha256) => protocols[sha256];

    /// <summary>A baseline scanner.</summary>
    /// <exception cref="InvalidOperationException">There is none.</exception>
    public HashedDocument<ScannerDocument> Scanner(string id) => Find<ScannerDocument>(DocumentKind.Scanner, id);

    /// <summary>Whether a scanner is in the baseline.</summary>
    public bool HasScanner(string id) => baseline.ContainsKey((DocumentKind.Scanner, id));

    /// <summary>The conditions that a protocol names.</summary>
    public HashedDocument<ConditionsDocument> Conditions(string id) => Find<ConditionsDocument>(DocumentKind.Conditions, id);

    /// <summary>What a protocol document on a scanner is predicted from.</summary>
    /// <exception cref="InvalidOperationException">A document that it needs is missing.</exception>
    public EvaluationInput Input(string protocolSha256, string scanner)
    {
        var protocol = protocols[protocolSha256];
        var catalogues = baseline.Values.OfType<HashedDocument<CatalogueDocument>>().OrderBy(catalogue => catalogue.Document.Id, StringComparer.Ordinal);
        var expectations = baseline.Values.OfType<HashedDocument<ExpectationsDocument>>().OrderBy(found => found.Document.Id, StringComparer.Ordinal);
        return new EvaluationInput(
            protocol,
            Scanner(scanner),
            Conditions(protocol.Document.Conditions),
            catalogues.FirstOrDefault(catalogue => catalogue.Document.Tissues.Any(tissue => tissue.AgeGroup == protocol.Document.AgeGroup))
                ?? throw new InvalidOperationException($"No catalogue holds tissues of the age group {protocol.Document.AgeGroup}."),
            expectations.FirstOrDefault(found => found.Document.Protocol == protocol.Document.Id),
            sampling);
    }

    private HashedDocument<T> Find<T>(DocumentKind kind, string id)
        where T : LedgerDocument =>
        baseline.GetValueOrDefault((kind, id)) as HashedDocument<T>
            ?? throw new InvalidOperationException($"There is no {new DocumentKey(kind, id)} in the run's baseline.");

    private static async Task<object> HashedAsync(IStores stores, DocumentShelf shelf, string hex, CancellationToken cancellationToken)
    {
        var hash = Convert.FromHexString(hex);
        var bytes = await stores.Ledger.FindBlobAsync(hash, cancellationToken)
            ?? throw new InvalidOperationException($"Document {hex} is not among the blobs.");
        return shelf.Read(hash, bytes) switch
        {
            ProtocolDocument document => new HashedDocument<ProtocolDocument>(document, hex, bytes),
            ScannerDocument document => new HashedDocument<ScannerDocument>(document, hex, bytes),
            ConditionsDocument document => new HashedDocument<ConditionsDocument>(document, hex, bytes),
            CatalogueDocument document => new HashedDocument<CatalogueDocument>(document, hex, bytes),
            ExpectationsDocument document => new HashedDocument<ExpectationsDocument>(document, hex, bytes),
            var other => throw new InvalidOperationException(other.GetType().Name),
        };
    }
}
