using System.Text;
using ProtoLedger.Ledger.Checkpoints;

namespace ProtoLedger.Ledger.Tests.Checkpoints;

public sealed class SignedNoteTests
{
    private const string Origin = "linden.example/protoledger";
    private static readonly NoteSigner Log = NoteSigner.FromSeed(Origin, new byte[32]);
    private static readonly NoteSigner Witness = NoteSigner.WitnessFromSeed("witness.example", Seed(7));
    private static readonly Checkpoint Checkpoint = new(Origin, 41, Digest.Of("root"u8));
    private static readonly DateTimeOffset Time = new(2026, 3, 4, 10, 20, 30, TimeSpan.Zero);

    [Fact]
    public void Parse_PublishedExampleOfTheNoteFormat_Verifies()
    {
        // The example of the Go package golang.org/x/mod/sumdb/note (key and note), written from memory: any slip in it
        // would make the signature fail.
        const string key = "PeterNeumann+c74f20a3+ARpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy10TW";
        const string note =
            "If you think cryptography is the answer to your problem,\nthen you don't know what your problem is.\n\n"
            + "\u2014 PeterNeumann x08go/ZJkuBS9UG/SffcvIAQxVBtiFupLLr8pAcElZInNIuGUgYN1FFYC2pZSNXgKvqfqdngotpRZb6KE6RyyBwJnAM=\n";
        var read = SignedNote.Parse(Encoding.UTF8.GetBytes(note)).Require();
        var known = NoteKey.Parse(key).Require();
        Assert.Equal([known], Assert.IsType<NoteVerification.Valid>(read.Verify([known])).Keys);
        Assert.Equal(note, Encoding.UTF8.GetString(read.ToBytes()));
    }

    [Fact]
    public void Verify_OwnCheckpoint_IsValidAndReadsBack()
    {
        var note = SignedNote.Parse(Log.Sign(Checkpoint).ToBytes()).Require();
        Assert.Equal([Log.PublicKey], Assert.IsType<NoteVerification.Valid>(note.Verify([Log.PublicKey])).Keys);
        Assert.Equal(Checkpoint, Ledger.Checkpoints.Checkpoint.Parse(note.Text).Require());
    }

    [Fact]
    public void Verify_EveryFlippedBit_IsRefusedOrLeavesNoKnownKey()
    {
        var bytes = Log.Sign(Checkpoint).ToBytes();
        for (var bit = 0; bit < bytes.Length * 8; bit++)
        {
            var changed = (byte[])bytes.Clone();
            changed[bit / 8] ^= (byte)(1 << bit % 8);
            Assert.False(SignedNote.Parse(changed) is Parsed<SignedNote>.Good(var note) && note.Verify([Log.PublicKey]) is NoteVerification.Valid, $"bit {bit}");
        }
    }

    [Fact]
    public void Verify_UnknownKeysBeside_AreIgnored()
    {
        var note = Log.Sign(Checkpoint);
        for (var i = 1; i <= 20; i++)
        {
            note = note.With(NoteSigner.FromSeed($"other-{i}.example", Seed(i)).Sign(Checkpoint).Signatures[0]);
        }

        var read = SignedNote.Parse(note.ToBytes()).Require();
        Assert.Equal(21, read.Signatures.Count);
        Assert.IsType<NoteVerification.Valid>(read.Verify([Log.PublicKey]));
    }

    [Fact]
    public void Verify_KnownKeyThatFailsBesideAGoodOne_SpoilsTheNote()
    {
        var other = NoteSigner.FromSeed("other.example", Seed(3));
        var wrong = other.Sign(Checkpoint with { Size = 42 }).Signatures[0];
        var verdict = Log.Sign(Checkpoint).With(wrong).Verify([Log.PublicKey, other.PublicKey]);
        Assert.Equal(new NoteVerification.BadSignature("other.example"), verdict);
    }

    [Fact]
    public void Verify_SameNameButAnotherKey_IsUnknown()
    {
        var impostor = NoteSigner.FromSeed(Origin, Seed(9));
        var verdict = Assert.IsType<NoteVerification.NoKnownKey>(impostor.Sign(Checkpoint).Verify([Log.PublicKey]));
        Assert.Equal([Origin], verdict.KeyNames);
    }

    [Fact]
    public void Cosign_ByAWitness_IsAcceptedAndBindsItsTime()
    {
        var note = Log.Sign(Checkpoint);
        var cosigned = SignedNote.Parse(note.With(Witness.Cosign(note, Time)).ToBytes()).Require();
        var valid = Assert.IsType<NoteVerification.Valid>(cosigned.Verify([Log.PublicKey, Witness.PublicKey]));
        Assert.Equal([Log.PublicKey, Witness.PublicKey], valid.Keys);

        // C2SP tlog-cosignature: 8 bytes of big-endian time in front of the signature over a header with that time.
        var line = cosigned.Signatures[1];
        Assert.Equal(72, line.Signature.Length);
        Assert.Equal(Time.ToUnixTimeSeconds(), (long)System.Buffers.Binary.BinaryPrimitives.ReadUInt64BigEndian(line.Signature));
        line.Signature[7] ^= 1;
        Assert.IsType<NoteVerification.BadSignature>(note.With(line).Verify([Log.PublicKey, Witness.PublicKey]));
    }

    [Fact]
    public void Sign_WithTheWrongKindOfKey_IsMisuse()
    {
        Assert.Throws<InvalidOperationException>(() => Witness.Sign(Checkpoint));
        Assert.Throws<InvalidOperationException>(() => Log.Cosign(Log.Sign(Checkpoint), Time));
    }

    [Theory]
    [InlineData("")]
    [InlineData("text\n")]
    [InlineData("text\n\n")]
    [InlineData("text\n\n\u2014 a AAAAAAAA")]
    [InlineData("text\n\n- a AAAAAAAA\n")]
    [InlineData("text\n\n\u2014 a\n")]
    [InlineData("text\n\n\u2014 a AAAA\n")]
    [InlineData("text\n\n\u2014 a AAAAAAB=\n")]
    [InlineData("text\n\n\u2014 a  AAAAAAAA\n")]
    [InlineData("text\n\n\u2014  AAAAAAAA\n")]
    [InlineData("text\n\n\u2014 a+b AAAAAAAA\n")]
    [InlineData("text\n\n\u2014 a AAAAAAAA x\n")]
    [InlineData("te\txt\n\n\u2014 a AAAAAAAA\n")]
    [InlineData("text\r\n\n\u2014 a AAAAAAAA\n")]
    [InlineData("text\n\n\u2014 a AAAAAAAA\nmore\n")]
    public void Parse_MalformedNote_IsRefused(string note) =>
        Assert.IsType<Parsed<SignedNote>.Bad>(SignedNote.Parse(Encoding.UTF8.GetBytes(note)));

    [Fact]
    public void Parse_InvalidUtf8OrTooLong_IsRefused()
    {
        Assert.IsType<Parsed<SignedNote>.Bad>(SignedNote.Parse([0xC3, 0x28, .. "\n\n\u2014 a AAAAAAAA\n"u8]));
        Assert.IsType<Parsed<SignedNote>.Bad>(SignedNote.Parse(new byte[SignedNote.MostBytes + 1]));
        var crowd = "text\n\n" + string.Concat(Enumerable.Repeat("\u2014 a AAAAAAAA\n", SignedNote.MostSignatures + 1));
        Assert.IsType<Parsed<SignedNote>.Bad>(SignedNote.Parse(Encoding.UTF8.GetBytes(crowd)));
    }

    [Theory]
    [InlineData("")]
    [InlineData("a+b")]
    [InlineData("a b+00000000+AQAA")]
    [InlineData("PeterNeumann+c74f20a4+ARpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy10TW")]
    [InlineData("PeterNeumann+C74F20A3+ARpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy10TW")]
    [InlineData("PeterNeumann+c74f20a3+Axpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy10TW")]
    [InlineData("PeterNeumann+c74f20a3+ARpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy")]
    public void NoteKey_MalformedText_IsRefused(string text) =>
        Assert.IsType<Parsed<NoteKey>.Bad>(NoteKey.Parse(text));

    [Fact]
    public void NoteKey_TextForm_ReadsBack()
    {
        foreach (var key in (NoteKey[])[Log.PublicKey, Witness.PublicKey, NoteSigner.Generate("x.example").PublicKey])
        {
            Assert.Equal(key, NoteKey.Parse(key.ToString()).Require());
        }
    }

    private static byte[] Seed(int value) => Enumerable.Repeat((byte)value, 32).ToArray();
}
