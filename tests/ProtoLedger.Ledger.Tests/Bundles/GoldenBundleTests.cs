using ProtoLedger.Ledger.Bundles;

namespace ProtoLedger.Ledger.Tests.Bundles;

/// <summary>
/// A bundle written by each released version, kept for ever, verifies with today's verifier in the same words.
/// A release adds its own with <c>PROTOLEDGER_WRITE_GOLDEN=0.2.0 dotnet run --project tests/ProtoLedger.Ledger.Tests</c>.
/// </summary>
public sealed class GoldenBundleTests
{
    private static readonly string Folder = Path.Combine(AppContext.BaseDirectory, "Bundles", "golden");

    public static TheoryData<string> Versions => [.. Directory.GetDirectories(Folder).Select(d => Path.GetFileName(d)).Order()];

    [Theory]
    [MemberData(nameof(Versions))]
    public void Verify_BundleOfAReleasedVersion_HoldsInTheSameWords(string version)
    {
        var folder = Path.Combine(Folder, version);
        byte[] Read(string name) => File.ReadAllBytes(Path.Combine(folder, name));
        var trust = BundleTrust.Parse(((string[])["site-ca.pem", "log.vkey"]).Select(n => (n, Read(n)))).Require();
        var report = BundleVerifier.Verify(Read("bundle.zip"), trust, Read("checkpoint.txt"));
        Assert.Equal(BundleOutcome.Good, report.Outcome);
        Assert.Equal(File.ReadAllLines(Path.Combine(folder, "report.txt")), report.Lines());
    }

    [Fact]
    public void Versions_HaveAtLeastTheFirst()
    {
        if (Environment.GetEnvironmentVariable("PROTOLEDGER_WRITE_GOLDEN") is { Length: > 0 } version)
        {
            Write(version);
        }

        Assert.Contains("0.1.0", Directory.GetDirectories(Folder).Select(d => Path.GetFileName(d)));
    }

    private static void Write(string version)
    {
        using var made = new TestBundle();
        var folder = Directory.CreateDirectory(Path.Combine(Folder, version)).FullName;
        void Keep(string name, byte[] content) => File.WriteAllBytes(Path.Combine(folder, name), content);
        var (bundle, checkpoint) = (made.ToBytes(), made.CheckpointAt(6).ToBytes());
        Keep("bundle.zip", bundle);
        Keep("checkpoint.txt", checkpoint);
        Keep("site-ca.pem", System.Text.Encoding.ASCII.GetBytes(made.Site.Authority.Certificate.ToPem()));
        Keep("log.vkey", System.Text.Encoding.UTF8.GetBytes($"{made.Log.PublicKey}\n"));
        File.WriteAllLines(Path.Combine(folder, "report.txt"), BundleVerifier.Verify(bundle, made.Trust, checkpoint).Lines());
    }
}
