using System.Security.Cryptography;

namespace ProtoLedger.Application.Site;

/// <summary>AES-256-GCM under the sealing key; the purpose is bound, so that one secret cannot stand in for another.</summary>
internal static class Sealing
{
    private const int NonceLength = 12;
    private const int TagLength = 16;

    /// <summary>Nonce, tag and cipher text.</summary>
    public static byte[] Seal(byte[] key, string purpose, ReadOnlySpan<byte> secret)
    {
        var result = new byte[NonceLength + TagLength + secret.Length];
        RandomNumberGenerator.Fill(result.AsSpan(0, NonceLength));
        using var cipher = new AesGcm(key, TagLength);
        cipher.Encrypt(
            result.AsSpan(0, NonceLength), secret, result.AsSpan(NonceLength + TagLength), result.AsSpan(NonceLength, TagLength),
            System.Text.Encoding.UTF8.GetBytes(purpose));
        return result;
    }

    /// <summary>The secret.</summary>
    /// <exception cref="AuthenticationTagMismatchException">Another key, another purpose, or altered bytes.</exception>
    public static byte[] Open(byte[] key, string purpose, ReadOnlySpan<byte> sealedSecret)
    {
        var secret = new byte[sealedSecret.Length - NonceLength - TagLength];
        using var cipher = new AesGcm(key, TagLength);
        cipher.Decrypt(
            sealedSecret[..NonceLength], sealedSecret[(NonceLength + TagLength)..], sealedSecret.Slice(NonceLength, TagLength), secret,
            System.Text.Encoding.UTF8.GetBytes(purpose));
        return secret;
    }
}
