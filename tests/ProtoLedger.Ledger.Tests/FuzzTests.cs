using System.Text;
using ProtoLedger.Ledger.Bundles;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Signatures;
using ProtoLedger.Ledger.Tests.Bundles;

namespace ProtoLedger.Ledger.Tests;

/// <summary>
/// Random edits (replace, insert, delete, repeat, swap pieces; fixed seeds) of everything that a verifier reads: a value
/// comes out, never an exception, and never the original meaning from other bytes.
/// </summary>
public sealed class FuzzTests
{
    [Fact]
    public void Bundle_RandomlyEditedEntriesUnderAFreshList_NeverThrowAndNeverPass()
    {
        using var made = new TestBundle();
        var (original, random) = (made.ToBytes(), new Random(20260304));
        var names = new Rezip(original).Names
            .Where(n => n is not (BundleNames.Index or BundleNames.Note or BundleNames.Sums or BundleNames.FirstPage) && !n.StartsWith("pages/", StringComparison.Ordinal))
            .ToList();
        for (var i = 0; i < 2_000; i++)
        {
            var rezip = new Rezip(original);
            var name = names[random.Next(names.Count)];
            var edited = Edit(rezip[name], random);
            if (edited.AsSpan().SequenceEqual(rezip[name]))
            {
                continue;
            }

            var report = BundleVerifier.Verify(rezip.Set(name, edited).Reindex(made.Log).ToBytes(), made.Trust);
            Assert.True(report.Outcome == BundleOutcome.Bad, $"round {i}: {name}");
        }
    }

    [Fact]
    public void Bundle_RandomlyEditedFile_NeverThrowsAndNeverPasses()
    {
        using var made = new TestBundle();
        var (original, random) = (made.ToBytes(), new Random(4711));
        for (var i = 0; i < 5_000; i++)
        {
            var edited = Edit(original, random);
            Assert.True(edited.AsSpan().SequenceEqual(original) || BundleVerifier.Verify(edited, made.Trust).Outcome == BundleOutcome.Bad, $"round {i}");
        }
    }

    [Fact]
    public void Readers_OfRandomlyEditedBytes_GiveValues()
    {
        using var made = new TestBundle();
        var (entries, random) = (new Rezip(made.ToBytes()), new Random(31337));
        var wrapped = made.Site.Physicist.Key.Wrap("a long enough passphrase", made.Site.Physicist.Certificate).ToBytes();
        (byte[] Bytes, Func<byte[], object> Read)[] readers =
        [
            (made.Leaves[4], b => LedgerLeaf.Parse(b)),
            (entries[BundleNames.Checkpoint], b => SignedNote.Parse(b)),
            (entries[BundleNames.Checkpoint], b => Checkpoint.Parse(Encoding.UTF8.GetString(b))),
            (entries[BundleNames.LogKey], b => NoteKey.Parse(Encoding.UTF8.GetString(b))),
            (entries[BundleNames.Authority], b => SigningCertificate.ParsePem(Encoding.UTF8.GetString(b))),
            (entries[BundleNames.Revocations], b => RevocationList.Parse(b)),
            (entries["signatures/4/manifest.json"], b => SignatureManifest.Parse(b)),
            (made.Site.Physicist.Certificate.ToDer(), b => SigningCertificate.Parse(b)),
            (wrapped, b => WrappedKey.Parse(b)),
            (entries["signatures/4/approval.p7s"], b => new SignatureVerifier(made.Site.Authority.Certificate, null)
                .Verify(entries["signatures/4/manifest.json"], b, made.Site.Physicist.Certificate.Fingerprint)),
        ];
        foreach (var (bytes, read) in readers)
        {
            for (var i = 0; i < 1_500; i++)
            {
                Assert.NotNull(read(Edit(bytes, random)));
            }
        }
    }

    private static byte[] Edit(byte[] bytes, Random random)
    {
        var result = bytes.ToList();
        for (var edits = random.Next(1, 4); edits > 0 && result.Count > 0; edits--)
        {
            var (at, length) = (random.Next(result.Count), random.Next(1, 9));
            length = Math.Min(length, result.Count - at);
            switch (random.Next(5))
            {
                case 0:
                    result[at] = (byte)random.Next(256);
                    break;
                case 1:
                    result.RemoveRange(at, length);
                    break;
                case 2:
                    result.InsertRange(at, Enumerable.Range(0, length).Select(_ => (byte)random.Next(256)));
                    break;
                case 3:
                    result.InsertRange(at, result.GetRange(at, length));
                    break;
                default:
                    result.Reverse(at, length);
                    break;
            }
        }

        return [.. result];
    }
}
