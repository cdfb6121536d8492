using System.Security.Cryptography;
using System.Text;
using System.Text.Json.Nodes;
using ProtoLedger.Ledger.Canonical;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>
/// A person's private key under the signing passphrase: PBKDF2-HMAC-SHA512 (RFC 8018) gives an AES-256-GCM key; the
/// associated data are account, certificate fingerprint and the parameters, so that a wrapped key cannot be moved to
/// another account or certificate nor its cost lowered. Nobody, the administrator included, can unwrap it without the passphrase.
/// </summary>
public sealed record WrappedKey
{
    /// <summary>Fewest PBKDF2 rounds accepted (common practice for SHA-512: 210,000).</summary>
    public const int LeastIterations = 210_000;

    /// <summary>Most PBKDF2 rounds accepted, so that a planted record cannot stall the server.</summary>
    public const int MostIterations = 10_000_000;

    private const string Kind = "AES-256-GCM, PBKDF2-HMAC-SHA512";
    private const int SaltLength = 16;
    private const int NonceLength = 12;
    private const int TagLength = 16;
    private readonly byte[] salt;
    private readonly byte[] nonce;
    private readonly byte[] sealedKey;

    private WrappedKey(string account, Digest certificate, int iterations, byte[] salt, byte[] nonce, byte[] sealedKey) =>
        (Account, Certificate, Iterations, this.salt, this.nonce, this.sealedKey) = (account, certificate, iterations, salt, nonce, sealedKey);

    /// <summary>Account that the key belongs to.</summary>
    public string Account { get; }

    /// <summary>Fingerprint of the certificate of this key.</summary>
    public Digest Certificate { get; }

    /// <summary>PBKDF2 rounds.</summary>
    public int Iterations { get; }

    /// <summary>Reads what <see cref="ToBytes"/> wrote.</summary>
    public static Parsed<WrappedKey> Parse(ReadOnlySpan<byte> bytes)
    {
        var owned = bytes.ToArray();
        return Parsed<WrappedKey>.From(() =>
        {
            var fields = CanonicalJson.Read(owned).Only("account", "certificate", "format", "iterations", "key", "nonce", "salt", "wrapping");
            var iterations = fields.Integer("iterations");
            if (fields.Integer("format") != 1 || fields.Text("wrapping") != Kind)
            {
                throw new FormatException("/wrapping or /format is not known here");
            }

            if (iterations is < LeastIterations or > MostIterations)
            {
                throw new FormatException($"/iterations is {iterations}, must be {LeastIterations} to {MostIterations}");
            }

            var key = new WrappedKey(
                fields.Text("account"), fields.Digest("certificate"), (int)iterations,
                fields.Base64("salt"), fields.Base64("nonce"), fields.Base64("key"));
            return key.salt.Length == SaltLength && key.nonce.Length == NonceLength && key.sealedKey.Length > TagLength
                ? key
                : throw new FormatException("/salt, /nonce or /key has a wrong length");
        });
    }

    /// <summary>Canonical JSON, to be stored.</summary>
    public byte[] ToBytes()
    {
        var fields = Parameters();
        fields.Add("key", Convert.ToBase64String(sealedKey));
        return CanonicalJson.Write(fields);
    }

    /// <summary>Opens the key. A wrong passphrase is a value, not an exception.</summary>
    public Unwrapping Unwrap(string passphrase)
    {
        ArgumentNullException.ThrowIfNull(passphrase);
        var pkcs8 = new byte[sealedKey.Length - TagLength];
        try
        {
            using var cipher = new AesGcm(Derive(passphrase, salt, Iterations), TagLength);
            cipher.Decrypt(nonce, sealedKey.AsSpan(0, pkcs8.Length), sealedKey.AsSpan(pkcs8.Length), pkcs8, CanonicalJson.Write(Parameters()));
            return new Unwrapping.Opened(PersonKey.FromPkcs8(pkcs8));
        }
        catch (AuthenticationTagMismatchException)
        {
            return new Unwrapping.WrongPassphrase();
        }
        finally
        {
            CryptographicOperations.ZeroMemory(pkcs8);
        }
    }

    internal static WrappedKey Wrap(ECDsa key, string passphrase, SigningCertificate certificate, int iterations)
    {
        ArgumentException.ThrowIfNullOrEmpty(passphrase);
        ArgumentNullException.ThrowIfNull(certificate);
        ArgumentOutOfRangeException.ThrowIfLessThan(iterations, LeastIterations);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(iterations, MostIterations);
        if (!key.ExportSubjectPublicKeyInfo().AsSpan().SequenceEqual(certificate.PublicKey))
        {
            throw new ArgumentException("The certificate is of another key.", nameof(certificate));
        }

        var pkcs8 = key.ExportPkcs8PrivateKey();
        var result = new WrappedKey(
            certificate.Subject.Account, certificate.Fingerprint, iterations,
            RandomNumberGenerator.GetBytes(SaltLength), RandomNumberGenerator.GetBytes(NonceLength), new byte[pkcs8.Length + TagLength]);
        using var cipher = new AesGcm(Derive(passphrase, result.salt, iterations), TagLength);
        cipher.Encrypt(
            result.nonce, pkcs8, result.sealedKey.AsSpan(0, pkcs8.Length), result.sealedKey.AsSpan(pkcs8.Length),
            CanonicalJson.Write(result.Parameters()));
        CryptographicOperations.ZeroMemory(pkcs8);
        return result;
    }

    private static byte[] Derive(string passphrase, byte[] salt, int iterations) =>
        Rfc2898DeriveBytes.Pbkdf2(Encoding.UTF8.GetBytes(passphrase), salt, iterations, HashAlgorithmName.SHA512, 32);

    private JsonObject Parameters() => new()
    {
        ["format"] = 1,
        ["wrapping"] = Kind,
        ["account"] = Account,
        ["certificate"] = Certificate.ToString(),
        ["iterations"] = Iterations,
        ["salt"] = Convert.ToBase64String(salt),
        ["nonce"] = Convert.ToBase64String(nonce),
    };
}

/// <summary>Outcome of opening a wrapped key.</summary>
public abstract record Unwrapping
{
    private Unwrapping()
    {
    }

    /// <summary>The key; the caller disposes it.</summary>
    public sealed record Opened(PersonKey Key) : Unwrapping;

    /// <summary>The passphrase is wrong, or the record was altered: the cipher cannot tell these apart.</summary>
    public sealed record WrongPassphrase : Unwrapping;
}
