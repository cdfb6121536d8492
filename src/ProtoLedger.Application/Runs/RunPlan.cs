using System.Text.Json;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.Runs;

/// <summary>Everything that a run depends on, fixed before it starts and kept with it as canonical JSON.</summary>
/// <param name="Format">1.</param>
/// <param name="Samples">Tissue draws.</param>
/// <param name="Seed">Seed of the draws, decimal.</param>
/// <param name="Baseline">Documents other than protocols: newest effective version each, an edited one substituted.</param>
/// <param name="Replaced">The baseline document in whose place an edited one stands, or null.</param>
/// <param name="Substituted">Change request whose document stands in the baseline, or null.</param>
/// <param name="Subjects">Every stored protocol version and every protocol proposal under review.</param>
internal sealed record RunPlan(
    int Format,
    int Samples,
    string Seed,
    IReadOnlyList<RunDocument> Baseline,
    RunDocument? Replaced,
    long? Substituted,
    IReadOnlyList<RunSubject> Subjects)
{
    private static readonly JsonSerializerOptions Json = new(JsonSerializerDefaults.Web);

    /// <summary>Canonical bytes.</summary>
    public byte[] ToBytes() => CanonicalJson.Canonicalize(JsonSerializer.SerializeToUtf8Bytes(this, Json));

    /// <summary>Reads canonical bytes.</summary>
    public static RunPlan Parse(byte[] bytes) => JsonSerializer.Deserialize<RunPlan>(bytes, Json)!;
}

/// <summary>A document of a run.</summary>
/// <param name="Kind">Kind in lower case.</param>
/// <param name="Id">Identifier.</param>
/// <param name="Version">Number; 0 for the content of a change request.</param>
/// <param name="Sha256">Hash, lower-case hexadecimal.</param>
internal sealed record RunDocument(string Kind, string Id, int Version, string Sha256)
{
    /// <summary>Kind.</summary>
    [System.Text.Json.Serialization.JsonIgnore]
    public DocumentKind KindOf => Documents.DocumentKey.KindOf(Kind)!.Value;
}

/// <summary>A protocol version or proposal that a run predicts.</summary>
/// <param name="Protocol">Identifier.</param>
/// <param name="Version">Stored version; 0 for a proposal.</param>
/// <param name="ChangeRequest">Request of a proposal; 0 for a stored version.</param>
/// <param name="Before">Version that paired expectations compare with: the base of a proposal, the one before a stored version; 0 for none.</param>
/// <param name="Sha256">Hash of the document.</param>
internal sealed record RunSubject(string Protocol, int Version, long ChangeRequest, int Before, string Sha256);
