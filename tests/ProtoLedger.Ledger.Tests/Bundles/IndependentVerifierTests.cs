using System.Diagnostics;
using System.Text;
using System.Text.Json;
using ProtoLedger.Ledger.Bundles;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Signatures;
using ProtoLedger.Ledger.Tests.Signatures;

namespace ProtoLedger.Ledger.Tests.Bundles;

/// <summary>
/// The verifier in another language (independent_verifier.py beside this project: standard library and openssl only)
/// comes to the same outcome on every case.
/// </summary>
public sealed class IndependentVerifierTests : IDisposable
{
    private static readonly bool Present = Probe();
    private readonly TestBundle made = new();
    private readonly TemporaryFolder folder = new();

    public void Dispose()
    {
        made.Dispose();
        folder.Dispose();
    }

    [Fact]
    public void BothVerifiers_OnEveryFlippedByte_Refuse()
    {
        Require();
        var bundle = made.ToBytes();
        WriteTrust(folder.Path, made.Trust);
        folder.Write("bundle.zip", bundle);
        var outcomes = Python("--flips", Path.Combine(folder.Path, "bundle.zip"), "--trust", Path.Combine(folder.Path, "trust")).Trim();
        Assert.Equal(new string('1', bundle.Length), outcomes);
    }

    [Fact]
    public void BothVerifiers_OnGoodForgedAndUntrustedBundles_Agree()
    {
        Require();
        var expected = new SortedDictionary<string, int>(StringComparer.Ordinal);
        foreach (var (name, bundle, trust, checkpoint) in Cases())
        {
            var path = Directory.CreateDirectory(Path.Combine(folder.Path, name)).FullName;
            File.WriteAllBytes(Path.Combine(path, "bundle.zip"), bundle);
            if (trust != BundleTrust.None)
            {
                WriteTrust(path, trust);
            }

            if (checkpoint is not null)
            {
                File.WriteAllBytes(Path.Combine(path, "checkpoint.txt"), checkpoint);
            }

            expected.Add(name, BundleVerifier.Verify(bundle, trust, checkpoint).ExitCode);
        }

        using var answers = JsonDocument.Parse(Python("--cases", folder.Path));
        var actual = answers.RootElement.EnumerateObject().ToDictionary(p => p.Name, p => p.Value);
        var differing = expected.Where(e => actual[e.Key][0].GetInt32() != e.Value)
            .Select(e => $"{e.Key}: ours {e.Value}, theirs {actual[e.Key]}");
        Assert.Empty(differing);
        Assert.Equal([0, 1, 2, 3], expected.Values.Distinct().Order());
        Assert.True(expected.Count > 150, $"{expected.Count} cases");
    }

    private IEnumerable<(string Name, byte[] Bundle, BundleTrust Trust, byte[]? Checkpoint)> Cases()
    {
        var (good, trust) = (made.ToBytes(), made.Trust);
        yield return ("good", good, trust, null);
        yield return ("good-with-checkpoint", good, trust, made.CheckpointAt(5).ToBytes());
        yield return ("good-with-empty-checkpoint", good, trust, made.CheckpointAt(0).ToBytes());
        yield return ("no-trust", good, BundleTrust.None, null);
        yield return ("trust-without-authority", good, trust with { Authorities = [] }, null);
        yield return ("trust-without-key", good, trust with { Keys = [] }, null);
        yield return ("checkpoint-unreadable", good, trust, "nonsense"u8.ToArray());
        yield return ("checkpoint-of-other-history", good, trust, made.Log.Sign(new Checkpoint(TestBundle.Origin, 3, Digest.Of("x"u8))).ToBytes());
        yield return ("checkpoint-of-other-key", good, trust, made.CheckpointAt(3, NoteSigner.Generate(TestBundle.Origin)).ToBytes());
        yield return ("checkpoint-beyond-the-end", good, trust, made.Log.Sign(new Checkpoint(TestBundle.Origin, 99, Digest.Of("x"u8))).ToBytes());
        yield return ("list-signed-by-thief", new Rezip(good).Reindex(NoteSigner.Generate(TestBundle.Origin)).ToBytes(), trust, null);
        using var other = new TestBundle(new TestSite(), NoteSigner.Generate(TestBundle.Origin));
        yield return ("other-site-no-trust", other.ToBytes(), BundleTrust.None, null);
        yield return ("other-site-under-trust", other.ToBytes(), trust, null);
        yield return ("other-site-with-its-key-only", other.ToBytes(), trust with { Keys = other.Trust.Keys }, null);
        foreach (var (name, bundle) in WithTheLogKey(good))
        {
            yield return (name, bundle, trust, null);
        }

        foreach (var (name, revoked) in (IEnumerable<(string, TimeSpan)>)[("before", TimeSpan.FromDays(-1)), ("after", TimeSpan.FromDays(1))])
        {
            var list = made.Site.RevocationBytes(new Revocation(made.Site.Other.Certificate.Serial, TestSite.Signing + revoked, RevocationReason.KeyCompromise));
            yield return ($"revoked-{name}-signing", made.ToBytes(made.Contents() with { RevocationList = list }), trust, null);
        }

        var old = made.Site.Authority.IssueRevocationList([], 1, TestSite.Signing.AddDays(-1), TestSite.Signing.AddDays(9));
        yield return ("revocation-list-too-old", made.ToBytes(made.Contents() with { RevocationList = old }), trust, null);
        using var again = new TestBundle(made.Site, made.Log);
        again.RecordAgain(4, "t.okafor");
        yield return ("signature-recorded-twice", again.ToBytes(), trust, null);
        made.Leaves[1] = (LedgerLeaf.Parse(made.Leaves[1]).Require() with { Actor = "somebody.else" }).ToBytes();
        yield return ("history-rewritten-before-signatures", made.ToBytes(), trust, null);
    }

    /// <summary>A forger who holds the log's key removes, adds, exchanges and changes entries.</summary>
    private IEnumerable<(string Name, byte[] Bundle)> WithTheLogKey(byte[] good)
    {
        var names = new Rezip(good).Names.ToList();
        foreach (var name in names.Where(n => n is not (BundleNames.Index or BundleNames.Note or BundleNames.Sums)))
        {
            var flat = name.Replace('/', '-');
            yield return ($"removed-{flat}", new Rezip(good).Remove(name).Reindex(made.Log).ToBytes());
            yield return ($"emptied-{flat}", new Rezip(good).Set(name, []).Reindex(made.Log).ToBytes());
            var content = new Rezip(good)[name];
            for (var i = 0; i < 6; i++)
            {
                var changed = (byte[])content.Clone();
                changed[content.Length * i / 6] ^= 0x01;
                yield return ($"changed-{i}-{flat}", new Rezip(good).Set(name, changed).Reindex(made.Log).ToBytes());
            }
        }

        yield return ("added-blob", new Rezip(good).Insert(1, BundleNames.Blob(Digest.Of("x"u8)), "x"u8.ToArray()).Reindex(made.Log).ToBytes());
        yield return ("added-beside-signature", new Rezip(good).Insert(1, "signatures/4/other.md", "x"u8.ToArray()).Reindex(made.Log).ToBytes());
        yield return ("added-odd-folder", new Rezip(good).Insert(1, "signatures/04/manifest.json", "x"u8.ToArray()).Reindex(made.Log).ToBytes());
        yield return ("added-page", new Rezip(good).Insert(1, "pages/more.html", "x"u8.ToArray()).Reindex(made.Log).ToBytes());
        yield return ("swapped-entries", new Rezip(good).Swap(1, 2).ToBytes());
    }

    private static void WriteTrust(string path, BundleTrust trust)
    {
        var target = Directory.CreateDirectory(Path.Combine(path, "trust")).FullName;
        foreach (var (authority, i) in trust.Authorities.Select((a, i) => (a, i)))
        {
            File.WriteAllText(Path.Combine(target, $"{i}.pem"), authority.ToPem());
        }

        File.WriteAllLines(Path.Combine(target, "log.vkey"), trust.Keys.Select(k => k.ToString()));
    }

    private static void Require()
    {
        Assert.SkipUnless(Present, "python3 is not on the PATH of this machine");
        OpenSsl.Require();
    }

    private static string Python(params string[] arguments)
    {
        var script = Path.Combine(AppContext.BaseDirectory, "independent_verifier.py");
        var start = new ProcessStartInfo("python3", [script, .. arguments]) { RedirectStandardOutput = true, RedirectStandardError = true, StandardOutputEncoding = Encoding.UTF8 };
        using var process = Process.Start(start)!;
        var error = process.StandardError.ReadToEndAsync();
        var output = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        Assert.True(process.ExitCode == 0, error.Result);
        return output;
    }

    private static bool Probe()
    {
        try
        {
            using var process = Process.Start(new ProcessStartInfo("python3", "--version") { RedirectStandardOutput = true })!;
            process.WaitForExit();
            return process.ExitCode == 0;
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return false;
        }
    }
}
