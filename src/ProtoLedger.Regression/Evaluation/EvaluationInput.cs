using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Regression.Evaluation;

/// <summary>Everything on which the prediction of one protocol version on one scanner depends.</summary>
/// <param name="Protocol">The version.</param>
/// <param name="Scanner">The scanner that runs it.</param>
/// <param name="Conditions">B0/B1 conditions that the protocol names.</param>
/// <param name="Catalogue">Tissue values.</param>
/// <param name="Expectations">Written limits for this protocol, or null where none are written.</param>
/// <param name="Sampling">How uncertainty is sampled.</param>
public sealed record EvaluationInput(
    HashedDocument<ProtocolDocument> Protocol,
    HashedDocument<ScannerDocument> Scanner,
    HashedDocument<ConditionsDocument> Conditions,
    HashedDocument<CatalogueDocument> Catalogue,
    HashedDocument<ExpectationsDocument>? Expectations,
    SamplePlan Sampling)
{
    /// <summary>SHA-256 over the hashes of the documents, the sampling and the model, lower-case hexadecimal. Equal inputs may share one computation.</summary>
    /// <param name="modelId">Identity of the model that will compute.</param>
    /// <param name="before">The state that paired expectations compare with, or null.</param>
    public string Hash(string modelId, EvaluationInput? before = null)
    {
        var text = string.Join(
            '\n',
            modelId,
            Protocol.Sha256,
            Scanner.Sha256,
            Conditions.Sha256,
            Catalogue.Sha256,
            Expectations?.Sha256 ?? "-",
            Sampling.Samples.ToString(CultureInfo.InvariantCulture),
            Sampling.Seed.ToString(CultureInfo.InvariantCulture),
            before is null ? "-" : before.Hash(modelId));
        return Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text)));
    }
}

/// <summary>Number of tissue draws and the seed that fixes them; both are stored with every result.</summary>
/// <param name="Samples">Draws, at least <see cref="MinimumSamples"/>.</param>
/// <param name="Seed">Seed of the scrambling; equal seeds give equal draws for every version, scanner and edit.</param>
public sealed record SamplePlan(int Samples, ulong Seed)
{
    /// <summary>Fewest draws with which a probability may be stated.</summary>
    public const int MinimumSamples = 256;

    /// <summary>512 draws from a fixed seed.</summary>
    public static SamplePlan Default { get; } = new(512, 20240229);

    /// <summary>Draws, at least <see cref="MinimumSamples"/>.</summary>
    public int Samples { get; } = Samples >= MinimumSamples
        ? Samples
        : throw new ArgumentOutOfRangeException(nameof(Samples), Samples, $"At least {MinimumSamples} draws are needed.");
}
