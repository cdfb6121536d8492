using System.Security.Cryptography;
using System.Text;

namespace ProtoLedger.Application.Accounts;

/// <summary>Secrets of sessions and tokens: shown once, stored as a hash only.</summary>
internal static class Secrets
{
    private const string SessionPrefix = "pls_";
    private const string ApiPrefix = "plt_";

    /// <summary>A new secret: prefix, 256 random bits, and a checksum by which scanners of leaked secrets know it.</summary>
    public static string New(bool session)
    {
        var body = (session ? SessionPrefix : ApiPrefix) + Base64Url(RandomNumberGenerator.GetBytes(32));
        return body + Checksum(body);
    }

    /// <summary>Hash under which the secret is stored.</summary>
    public static byte[] Hash(string secret) => SHA256.HashData(Encoding.UTF8.GetBytes(secret));

    /// <summary>False for what cannot be one of our secrets, before the database is asked.</summary>
    public static bool LooksRight(string secret) =>
        secret.Length == 53
        && (secret.StartsWith(SessionPrefix, StringComparison.Ordinal) || secret.StartsWith(ApiPrefix, StringComparison.Ordinal))
        && Checksum(secret[..^6]) == secret[^6..];

    private static string Checksum(string body) => Base64Url(SHA256.HashData(Encoding.UTF8.GetBytes(body)))[..6];

    private static string Base64Url(byte[] bytes) => Convert.ToBase64String(bytes).TrimEnd('=').Replace('+', '-').Replace('/', '_');
}
