using System.Security.Cryptography;
using System.Text.Json.Nodes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.History;

/// <summary>Facts about signatures.</summary>
internal static class SignatureFacts
{
    /// <summary>Type of the fact.</summary>
    public const string Type = "signature-given";

    /// <summary>A signature; its manifest names the same subject.</summary>
    public static Fact Of(SignatureRow signature, string subject, byte[] certificate) => new(
        Type, subject, Values(signature), ("manifest.json", signature.Manifest), ("approval.p7s", signature.Cms), ("certificate", certificate));

    /// <summary>Every value of a signature, its files by hash.</summary>
    public static JsonObject Values(SignatureRow signature) => new()
    {
        ["changeRequest"] = signature.ChangeRequestId,
        ["number"] = signature.Number,
        ["round"] = signature.Round,
        ["signer"] = signature.Signer,
        ["signerName"] = signature.SignerName,
        ["role"] = signature.Role,
        ["meaning"] = signature.Meaning,
        ["time"] = VersionFacts.Time(signature.Time),
        ["certificateSha256"] = Convert.ToHexStringLower(signature.CertificateSha256),
        ["manifestSha256"] = Convert.ToHexStringLower(SHA256.HashData(signature.Manifest)),
        ["cmsSha256"] = Convert.ToHexStringLower(SHA256.HashData(signature.Cms)),
    };
}
