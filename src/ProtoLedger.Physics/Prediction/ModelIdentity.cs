using System.Globalization;
using System.Security.Cryptography;
using System.Text;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Which model computed a number.</summary>
public static class ModelIdentity
{
    /// <summary>Raised whenever any predicted number changes; a test compares it with the probe hash.</summary>
    public const int Version = 2;

    private static readonly Lazy<string> Identity = new(() => $"{Version}-{Hash(Probes.Results())}");

    /// <summary>Version and hash of the probe results, such as <c>2-0f3a…</c>: the version constant, a hyphen, and 16 hexadecimal digits.</summary>
    /// <remarks>Probe results of every family at 12 significant digits, one a line, SHA-256, first 8 bytes.</remarks>
    public static string Current => Identity.Value;

    internal static string Hash(IEnumerable<double> results)
    {
        var text = string.Join('\n', results.Select(r => r.ToString("E11", CultureInfo.InvariantCulture)));
        return Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text)).AsSpan(0, 8));
    }
}
