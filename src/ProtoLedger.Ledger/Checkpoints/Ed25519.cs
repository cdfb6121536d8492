using NSec.Cryptography;
using Org.BouncyCastle.Crypto.Parameters;

namespace ProtoLedger.Ledger.Checkpoints;

/// <summary>
/// Ed25519 (RFC 8032). The native library does the work; where a platform lacks it the managed one takes over, so that a
/// bundle can be verified anywhere. Both give the same bytes, which a test compares.
/// </summary>
internal static class Ed25519
{
    public const int KeyLength = 32;
    public const int SignatureLength = 64;

    private static readonly bool HasNative = ProbeNative();

    public static byte[] PublicKey(ReadOnlySpan<byte> seed) =>
        HasNative ? Native.PublicKey(seed) : Managed.PublicKey(seed);

    public static byte[] Sign(ReadOnlySpan<byte> seed, ReadOnlySpan<byte> message) =>
        HasNative ? Native.Sign(seed, message) : Managed.Sign(seed, message);

    public static bool Verify(ReadOnlySpan<byte> publicKey, ReadOnlySpan<byte> message, ReadOnlySpan<byte> signature) =>
        signature.Length == SignatureLength && publicKey.Length == KeyLength
        && (HasNative ? Native.Verify(publicKey, message, signature) : Managed.Verify(publicKey, message, signature));

    private static bool ProbeNative()
    {
        try
        {
            return Native.PublicKey(new byte[KeyLength]).Length == KeyLength;
        }
        catch (Exception fault) when (fault is DllNotFoundException or TypeInitializationException or PlatformNotSupportedException)
        {
            return false;
        }
    }

    internal static class Native
    {
        private static readonly NSec.Cryptography.Ed25519 Algorithm = SignatureAlgorithm.Ed25519;

        public static byte[] PublicKey(ReadOnlySpan<byte> seed)
        {
            using var key = Key.Import(Algorithm, seed, KeyBlobFormat.RawPrivateKey);
            return key.PublicKey.Export(KeyBlobFormat.RawPublicKey);
        }

        public static byte[] Sign(ReadOnlySpan<byte> seed, ReadOnlySpan<byte> message)
        {
            using var key = Key.Import(Algorithm, seed, KeyBlobFormat.RawPrivateKey);
            return Algorithm.Sign(key, message);
        }

        public static bool Verify(ReadOnlySpan<byte> publicKey, ReadOnlySpan<byte> message, ReadOnlySpan<byte> signature) =>
            NSec.Cryptography.PublicKey.TryImport(Algorithm, publicKey, KeyBlobFormat.RawPublicKey, out var key)
            && Algorithm.Verify(key!, message, signature);
    }

    internal static class Managed
    {
        public static byte[] PublicKey(ReadOnlySpan<byte> seed) =>
            new Ed25519PrivateKeyParameters(seed.ToArray()).GeneratePublicKey().GetEncoded();

        public static byte[] Sign(ReadOnlySpan<byte> seed, ReadOnlySpan<byte> message)
        {
            var signature = new byte[SignatureLength];
            var bytes = message.ToArray();
            new Ed25519PrivateKeyParameters(seed.ToArray()).Sign(
                Org.BouncyCastle.Math.EC.Rfc8032.Ed25519.Algorithm.Ed25519, null, bytes, 0, bytes.Length, signature, 0);
            return signature;
        }

        public static bool Verify(ReadOnlySpan<byte> publicKey, ReadOnlySpan<byte> message, ReadOnlySpan<byte> signature)
        {
            try
            {
                var bytes = message.ToArray();
                return new Ed25519PublicKeyParameters(publicKey.ToArray()).Verify(
                    Org.BouncyCastle.Math.EC.Rfc8032.Ed25519.Algorithm.Ed25519, null, bytes, 0, bytes.Length, signature.ToArray(), 0);
            }
            catch (ArgumentException)
            {
                return false; // The bytes are no point of the curve.
            }
        }
    }
}
