using ProtoLedger.Ledger.Bundles;

namespace ProtoLedger.Ledger.Tests.Bundles;

public sealed class BundleVerifierTests : IDisposable
{
    private readonly TestBundle made = new();

    public void Dispose() => made.Dispose();

    [Fact]
    public void Verify_GoodBundleWithTrustAndAnOlderCheckpoint_IsGoodAndSaysWhatHolds()
    {
        var report = BundleVerifier.Verify(made.ToBytes(), made.Trust, made.CheckpointAt(6).ToBytes());
        Assert.Equal(0, report.ExitCode);
        Assert.Empty(report.Faults);
        Assert.Empty(report.Unknown);
        var words = string.Join("\n", report.Lines());
        Assert.Contains("GOOD", words, StringComparison.Ordinal);
        Assert.Contains("Tunde Okafor (physicist) signed 'approved' for change-request/17", words, StringComparison.Ordinal);
        Assert.Contains("nothing of its 6 facts was changed or removed", words, StringComparison.Ordinal);
        Assert.Equal([4L, 6L], report.Signatures.Keys.Order());
    }

    [Fact]
    public void Verify_WithoutTrust_IsConsistentWithUnknownOrigin()
    {
        var report = BundleVerifier.Verify(made.ToBytes(), BundleTrust.None);
        Assert.Equal(BundleOutcome.OriginUnknown, report.Outcome);
        Assert.Equal(3, report.ExitCode);
        Assert.Contains(report.Unknown, u => u.Contains("whose log this is", StringComparison.Ordinal));
        Assert.Contains(report.Unknown, u => u.Contains("cut off", StringComparison.Ordinal));
    }

    [Fact]
    public void Write_TwiceFromTheSameContents_GivesTheSameBytes()
    {
        var contents = made.Contents();
        Assert.Equal(made.ToBytes(contents), made.ToBytes(contents));
    }

    [Fact]
    public void Verify_EveryFlippedByte_IsRefusedAndNamed()
    {
        var bundle = made.ToBytes();
        var accepted = new List<int>();
        for (var i = 0; i < bundle.Length; i++)
        {
            var changed = (byte[])bundle.Clone();
            changed[i] ^= (byte)(1 + i % 255);
            var report = BundleVerifier.Verify(changed, made.Trust);
            if (report.Outcome != BundleOutcome.Bad || report.Faults.Count == 0 || report.Faults[0].Entry.Length == 0)
            {
                accepted.Add(i);
            }
        }

        Assert.Empty(accepted);
        Assert.True(bundle.Length > 8_000, $"{bundle.Length} bytes tried");
    }
}
