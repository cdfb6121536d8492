using System.Text;
using ProtoLedger.Ledger.Checkpoints;

namespace ProtoLedger.Ledger.Tests.Checkpoints;

public sealed class CheckpointTests
{
    private static readonly Digest Root = Digest.Of("root"u8);

    [Fact]
    public void ToNoteText_HasThreeLines()
    {
        // C2SP tlog-checkpoint v1.0.0: origin, decimal size, base64 root, each with a line feed.
        var text = new Checkpoint("linden.example/protoledger", 70_000, Root).ToNoteText();
        Assert.Equal($"linden.example/protoledger\n70000\n{Convert.ToBase64String(Root.ToArray())}\n", text);
        Assert.Equal(new Checkpoint("linden.example/protoledger", 70_000, Root), Checkpoint.Parse(text).Require());
    }

    [Fact]
    public void ShortHash_IsSizeAndSixteenDigits()
    {
        var hex = Root.ToString();
        Assert.Equal($"42:{hex[..4]}-{hex[4..8]}-{hex[8..12]}-{hex[12..16]}", new Checkpoint("o", 42, Root).ShortHash);
    }

    [Theory]
    [InlineData("")]
    [InlineData("o\n5\n")]
    [InlineData("o\n5\nROOT\nextension\n")]
    [InlineData("o\n5\nROOT")]
    [InlineData("\n5\nROOT\n")]
    [InlineData(" o\n5\nROOT\n")]
    [InlineData("o+x\n5\nROOT\n")]
    [InlineData("o\r\n5\nROOT\n")]
    [InlineData("o\n05\nROOT\n")]
    [InlineData("o\n-5\nROOT\n")]
    [InlineData("o\n+5\nROOT\n")]
    [InlineData("o\n5 \nROOT\n")]
    [InlineData("o\n0x5\nROOT\n")]
    [InlineData("o\n5,000\nROOT\n")]
    [InlineData("o\n\nROOT\n")]
    [InlineData("o\n9223372036854775808\nROOT\n")]
    [InlineData("o\n٥\nROOT\n")]
    [InlineData("o\n5\n ROOT\n")]
    [InlineData("o\n5\nAAAA\n")]
    [InlineData("o\n5\n!!!!\n")]
    public void Parse_MalformedText_IsRefused(string text) =>
        Assert.IsType<Parsed<Checkpoint>.Bad>(Checkpoint.Parse(text.Replace("ROOT", Root.ToBase64(), StringComparison.Ordinal)));

    [Fact]
    public void Parse_Base64WithOddTrailingBits_IsRefused()
    {
        // The last character before the padding carries two bits that decode to nothing: only zero is canonical.
        var root = Root.ToBase64();
        foreach (var last in "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/".Where(c => c != root[42]))
        {
            var other = root[..42] + last + "=";
            if (Convert.FromBase64String(other).AsSpan().SequenceEqual(Root.ToArray()))
            {
                Assert.IsType<Parsed<Checkpoint>.Bad>(Checkpoint.Parse($"o\n5\n{other}\n"));
            }
        }
    }

    [Fact]
    public void Ed25519_BothImplementations_GiveTheBytesOfRfc8032()
    {
        // RFC 8032 section 7.1, test 1 (empty message) and test 2 (one byte), written from memory: a slip would fail here.
        (string Seed, string Key, string Message, string Signature)[] vectors =
        [
            ("9d61b19deffd5a60ba844af492ec2cc44449c5697b326919703bac031cae7f60",
             "d75a980182b10ab7d54bfed3c964073a0ee172f3daa62325af021a68f707511a", "",
             "e5564300c360ac729086e2cc806e828a84877f1eb8e5d974d873e065224901555fb8821590a33bacc61e39701cf9b46bd25bf5f0595bbe24655141438e7a100b"),
            ("4ccd089b28ff96da9db6c346ec114e0f5b8a319f35aba624da8cf6ed4fb8a6fb",
             "3d4017c3e843895a92b70aa74d1b7ebc9c982ccf2ec4968cc0cd55f12af4660c", "72",
             "92a009a9f0d4cab8720e820b5f642540a2b27b5416503f8fb3762223ebdb69da085ac1e43e15996e458f3613d0f11d8c387b2eaeb4302aeeb00d291612bb0c00"),
        ];
        foreach (var (seed, key, message, signature) in vectors)
        {
            var (s, m) = (Convert.FromHexString(seed), Convert.FromHexString(message));
            Assert.Equal(key, Convert.ToHexStringLower(Ed25519.Native.PublicKey(s)));
            Assert.Equal(key, Convert.ToHexStringLower(Ed25519.Managed.PublicKey(s)));
            Assert.Equal(signature, Convert.ToHexStringLower(Ed25519.Native.Sign(s, m)));
            Assert.Equal(signature, Convert.ToHexStringLower(Ed25519.Managed.Sign(s, m)));
            Assert.True(Ed25519.Native.Verify(Convert.FromHexString(key), m, Convert.FromHexString(signature)));
            Assert.True(Ed25519.Managed.Verify(Convert.FromHexString(key), m, Convert.FromHexString(signature)));
        }
    }

    [Fact]
    public void Ed25519_BothImplementations_RefuseTheSameChangedSignatures()
    {
        var seed = Enumerable.Range(0, 32).Select(i => (byte)i).ToArray();
        var (key, message) = (Ed25519.PublicKey(seed), Encoding.UTF8.GetBytes("message"));
        var signature = Ed25519.Sign(seed, message);
        for (var i = 0; i < signature.Length; i++)
        {
            var changed = (byte[])signature.Clone();
            changed[i] ^= 0x10;
            Assert.False(Ed25519.Native.Verify(key, message, changed));
            Assert.False(Ed25519.Managed.Verify(key, message, changed));
        }
    }
}
