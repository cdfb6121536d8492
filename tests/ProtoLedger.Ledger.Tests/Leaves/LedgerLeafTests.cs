using System.Text;
using System.Text.Json;
using CsCheck;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Ledger.Tests.Leaves;

public sealed class LedgerLeafTests
{
    private static readonly DateTimeOffset Time = new(2026, 3, 4, 10, 20, 30, 123, 456, TimeSpan.Zero);

    [Fact]
    public void ToBytes_ASimpleLeaf_IsAsInTheDesign()
    {
        // SHA-256 of "abc": FIPS 180-4 example.
        var leaf = new LedgerLeaf("version-approved", 1, Time, "t.okafor", "protocol/brain/7", new Dictionary<string, Digest>
        {
            ["report"] = Digest.Of("abc"u8), ["document"] = Digest.Of(""u8),
        });
        Assert.Equal(
            "{\"actor\":\"t.okafor\",\"blobs\":{\"document\":\"e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855\","
            + "\"report\":\"ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad\"},"
            + "\"subject\":\"protocol/brain/7\",\"time\":\"2026-03-04T10:20:30.123456Z\",\"type\":\"version-approved\",\"v\":1}",
            Encoding.UTF8.GetString(leaf.ToBytes()));
        Assert.Equal(MerkleHash.Leaf(leaf.ToBytes()), leaf.Hash());
    }

    [Fact]
    public void ToBytes_AnyTexts_EqualTheOtherCanonicaliser()
    {
        // Names with controls, quotes, surrogate pairs and characters that sort differently in UTF-8 and UTF-16.
        var text = Gen.Char["\u0001\u001f\b\t\n\f\r\"\\/ aZ~\u007f\u0080é€\u2028\ufb33\uffff"].Array[1, 12].Select(c => new string(c));
        var any = Gen.OneOf(text, Gen.Const("\U0001F600"), Gen.Const("\ue000"), Gen.Const("x\U00010000y"));
        Gen.Select(any, any, Gen.Dictionary(any, Gen.Byte.Array[32])[0, 5]).Sample((actor, subject, blobs) =>
        {
            var leaf = new LedgerLeaf("fact", 3, Time, actor, subject, blobs.ToDictionary(b => b.Key, b => new Digest(b.Value)));
            var members = new Dictionary<string, object>
            {
                ["v"] = 3, ["type"] = "fact", ["time"] = "2026-03-04T10:20:30.123456Z", ["subject"] = subject, ["actor"] = actor,
                ["blobs"] = blobs.ToDictionary(b => b.Key, b => Convert.ToHexStringLower(b.Value)),
            };
            var other = CanonicalJson.Canonicalize(JsonSerializer.SerializeToUtf8Bytes(members));
            return leaf.ToBytes().AsSpan().SequenceEqual(other);
        }, iter: 2000, seed: "0000KDGnYFN3");
    }

    [Fact]
    public void Parse_WhatToBytesWrote_GivesTheSameLeaf()
    {
        var leaf = new LedgerLeaf("fact", 2, Time, "é", "s", new Dictionary<string, Digest> { ["a"] = Digest.Of("1"u8) });
        var read = LedgerLeaf.Parse(leaf.ToBytes()).Require();
        Assert.Equal(leaf with { Blobs = read.Blobs }, read);
        Assert.Equal(leaf.Blobs, read.Blobs);
    }

    [Theory]
    [InlineData("", "strict JSON")]
    [InlineData("[]", "not a JSON object")]
    [InlineData("{}", "/type is missing")]
    [InlineData(" {}", "canonical")]
    [InlineData("""{"actor":"a","actor":"b","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "strict JSON")]
    [InlineData("""{"actor":"a","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}x""", "strict JSON")]
    [InlineData("""{"blobs":{},"actor":"a","subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "canonical")]
    [InlineData("""{"actor":"a","blobs":{},"extra":"e","subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "/extra is not known")]
    [InlineData("""{"actor":"","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "/actor is empty")]
    [InlineData("""{"actor":"a","blobs":{},"subject":"","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "/subject is empty")]
    [InlineData("""{"actor":"a","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"T","v":1}""", "/type is 'T'")]
    [InlineData("""{"actor":"a","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":0}""", "/v is 0")]
    [InlineData("""{"actor":"a","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":"1"}""", "/v must be a whole number")]
    [InlineData("""{"actor":"a","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1.5}""", "strict JSON")]
    [InlineData("""{"actor":"a","blobs":{},"subject":"s","time":"2026-03-04T10:20:30Z","type":"t","v":1}""", "/time must be")]
    [InlineData("""{"actor":"a","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456+01:00","type":"t","v":1}""", "/time must be")]
    [InlineData("""{"actor":"a","blobs":{"x":"ABC"},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "/blobs/x must be 64")]
    [InlineData("""{"actor":"a","blobs":[],"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "/blobs must be an object")]
    [InlineData("""{"actor":7,"blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "/actor must be a text")]
    [InlineData("""{"actor":"\u0061","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "canonical")]
    [InlineData("""{"actor":"\ud800","blobs":{},"subject":"s","time":"2026-03-04T10:20:30.123456Z","type":"t","v":1}""", "strict JSON")]
    public void Parse_BadBytes_SaysWhatIsWrong(string json, string reason)
    {
        var bad = Assert.IsType<Parsed<LedgerLeaf>.Bad>(LedgerLeaf.Parse(Encoding.UTF8.GetBytes(json)));
        Assert.Contains(reason, bad.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Parse_EveryTruncationAndFlippedByte_NeverThrowsNorGivesTheSameLeaf()
    {
        var bytes = new LedgerLeaf("fact", 2, Time, "é", "s", new Dictionary<string, Digest> { ["a"] = Digest.Of("1"u8) }).ToBytes();
        for (var i = 0; i < bytes.Length; i++)
        {
            Assert.IsType<Parsed<LedgerLeaf>.Bad>(LedgerLeaf.Parse(bytes.AsSpan(0, i)));
            for (var mask = 1; mask < 256; mask <<= 1)
            {
                var changed = (byte[])bytes.Clone();
                changed[i] ^= (byte)mask;
                Assert.False(LedgerLeaf.Parse(changed) is Parsed<LedgerLeaf>.Good(var leaf) && leaf.ToBytes().AsSpan().SequenceEqual(bytes));
            }
        }
    }

    [Fact]
    public void ToBytes_TimeFinerThanAMicrosecondOrNotUtc_IsMisuse()
    {
        var leaf = new LedgerLeaf("fact", 1, Time.AddTicks(3), "a", "s", new Dictionary<string, Digest>());
        Assert.Throws<ArgumentException>(leaf.ToBytes);
        Assert.Throws<ArgumentException>((leaf with { Time = Time.ToOffset(TimeSpan.FromHours(1)) }).ToBytes);
        Assert.Equal((leaf with { Time = Time }).ToBytes(), (leaf with { Time = LedgerTime.Truncate(Time.AddTicks(3).ToOffset(TimeSpan.FromHours(2))) }).ToBytes());
    }

    [Fact]
    public void ToBytes_UnpairedSurrogate_IsMisuse() =>
        Assert.Throws<ArgumentException>(new LedgerLeaf("fact", 1, Time, "a\ud800", "s", new Dictionary<string, Digest>()).ToBytes);
}
