using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Tests.Signatures;

public sealed class WrappedKeyTests : IDisposable
{
    private const string Passphrase = "granite velvet orbit 7 – über";
    private readonly TestSite site = new();

    public void Dispose() => site.Dispose();

    [Fact]
    public void Unwrap_WithThePassphrase_SignsAsBefore()
    {
        var stored = site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate).ToBytes();
        var opened = Assert.IsType<Unwrapping.Opened>(WrappedKey.Parse(stored).Require().Unwrap(Passphrase));
        using var key = opened.Key;
        var manifest = site.Physicist.Manifest();
        var verdict = new SignatureVerifier(site.Authority.Certificate, null).Verify(
            manifest.ToBytes(), key.Sign(manifest, site.Physicist.Certificate), site.Physicist.Certificate.Fingerprint);
        Assert.IsType<SignatureVerdict.Good>(verdict);
    }

    [Theory]
    [InlineData("")]
    [InlineData("granite velvet orbit 7 – uber")]
    [InlineData("granite velvet orbit 7 – über ")]
    [InlineData("Granite velvet orbit 7 – über")]
    public void Unwrap_WithAnotherPassphrase_IsAValue(string passphrase) =>
        Assert.IsType<Unwrapping.WrongPassphrase>(site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate).Unwrap(passphrase));

    [Fact]
    public void Unwrap_AfterMovingToAnotherAccountOrCertificateOrCost_Fails()
    {
        // Somebody with the database's rights rewrites one stored member: the associated data no longer fit.
        var stored = Encoding.UTF8.GetString(site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate).ToBytes());
        var other = site.Other.Certificate;
        string[] moved =
        [
            stored.Replace("t.okafor", "m.lindqvist", StringComparison.Ordinal),
            stored.Replace($"{site.Physicist.Certificate.Fingerprint}", $"{other.Fingerprint}", StringComparison.Ordinal),
            stored.Replace("210000", "210001", StringComparison.Ordinal),
        ];
        foreach (var text in moved)
        {
            Assert.NotEqual(stored, text);
            Assert.IsType<Unwrapping.WrongPassphrase>(WrappedKey.Parse(Encoding.UTF8.GetBytes(text)).Require().Unwrap(Passphrase));
        }
    }

    [Theory]
    [InlineData("210000", "209999", "/iterations is 209999, must be 210000 to 10000000")]
    [InlineData("210000", "10000001", "/iterations is 10000001")]
    [InlineData("AES-256-GCM", "AES-128-GCM", "/wrapping")]
    [InlineData("\"salt\":\"", "\"salt\":\"AA", "/salt")]
    [InlineData("\"format\":1", "\"format\":2", "/format")]
    public void Parse_WeakenedOrMalformedRecord_IsRefused(string from, string to, string reason)
    {
        var stored = Encoding.UTF8.GetString(site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate).ToBytes());
        var bad = Assert.IsType<Parsed<WrappedKey>.Bad>(WrappedKey.Parse(Encoding.UTF8.GetBytes(stored.Replace(from, to, StringComparison.Ordinal))));
        Assert.Contains(reason, bad.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void ToBytes_IsOpenedByThePublishedAlgorithmsAlone()
    {
        // RFC 8018 PBKDF2 and NIST SP 800-38D GCM from the managed library, by the record's documented fields.
        using var record = JsonDocument.Parse(site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate).ToBytes());
        byte[] Field(string name) => record.RootElement.GetProperty(name).GetBytesFromBase64();
        var derivation = new Org.BouncyCastle.Crypto.Generators.Pkcs5S2ParametersGenerator(new Org.BouncyCastle.Crypto.Digests.Sha512Digest());
        derivation.Init(Encoding.UTF8.GetBytes(Passphrase), Field("salt"), 210_000);
        var key = (Org.BouncyCastle.Crypto.Parameters.KeyParameter)derivation.GenerateDerivedParameters("AES256", 256);
        var cipher = new Org.BouncyCastle.Crypto.Modes.GcmBlockCipher(new Org.BouncyCastle.Crypto.Engines.AesEngine());
        var members = record.RootElement.EnumerateObject().Where(m => m.Name != "key").Select(m => $"{JsonSerializer.Serialize(m.Name)}:{m.Value.GetRawText()}");
        cipher.Init(false, new Org.BouncyCastle.Crypto.Parameters.AeadParameters(key, 128, Field("nonce"), Encoding.UTF8.GetBytes($"{{{string.Join(",", members)}}}")));
        var plain = new byte[cipher.GetOutputSize(Field("key").Length)];
        var length = cipher.ProcessBytes(Field("key"), 0, Field("key").Length, plain, 0);
        cipher.DoFinal(plain, length);

        using var opened = ECDsa.Create();
        opened.ImportPkcs8PrivateKey(plain, out _);
        Assert.Equal(site.Physicist.Key.PublicKey, opened.ExportSubjectPublicKeyInfo());
    }

    [Fact]
    public void Wrap_Twice_SharesNeitherSaltNorNonce()
    {
        using var a = JsonDocument.Parse(site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate).ToBytes());
        using var b = JsonDocument.Parse(site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate).ToBytes());
        foreach (var name in (string[])["salt", "nonce", "key"])
        {
            Assert.NotEqual(a.RootElement.GetProperty(name).GetString(), b.RootElement.GetProperty(name).GetString());
        }
    }

    [Fact]
    public void Wrap_WithFewerRoundsOrAnotherPersonsCertificate_IsMisuse()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate, 1000));
        Assert.Throws<ArgumentException>(() => site.Physicist.Key.Wrap(Passphrase, site.Other.Certificate));
    }

    [Fact]
    public void Reset_MakesANewKey_AndTheOldOneStaysWithItsOldPassphraseAndRevocation()
    {
        // What an administrator's reset amounts to: new key and certificate, old certificate revoked at that time.
        var old = site.Physicist.Key.Wrap(Passphrase, site.Physicist.Certificate);
        using var key = PersonKey.Generate();
        var renewed = site.Authority.Issue(site.Physicist.Certificate.Subject, key.PublicKey, TestSite.Start, TestSite.Start.AddYears(2), SiteAuthority.NewSerial());
        Assert.IsType<Unwrapping.WrongPassphrase>(old.Unwrap("new passphrase of the reset"));

        var list = site.Revocations(new Revocation(site.Physicist.Certificate.Serial, TestSite.Signing.AddHours(-1), RevocationReason.Superseded));
        var manifest = site.Physicist.Manifest();
        var verifier = new SignatureVerifier(site.Authority.Certificate, list);
        Assert.IsType<SignatureVerdict.CertificateRevoked>(verifier.Verify(
            manifest.ToBytes(), site.Physicist.Key.Sign(manifest, site.Physicist.Certificate), site.Physicist.Certificate.Fingerprint));
        var again = manifest with { Certificate = renewed.Fingerprint };
        Assert.IsType<SignatureVerdict.Good>(verifier.Verify(again.ToBytes(), key.Sign(again, renewed), renewed.Fingerprint));
    }
}
