using System.Text;
using ProtoLedger.Ledger.Checkpoints;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>
/// Verifies a bundle offline, from its bytes and from what the reader trusts. Nothing is unpacked, no clock is read, and
/// no input makes it throw.
/// </summary>
public static class BundleVerifier
{
    /// <summary>Largest bundle that is read, bytes. Entries are stored without compression, so that this also bounds what they unpack to.</summary>
    public const int MostBytes = 1 << 30;

    /// <summary>Reads a stream to its end, at most <see cref="MostBytes"/>, and verifies it.</summary>
    /// <param name="bundle">The zip file.</param>
    /// <param name="trust">Trust anchors from outside, or <see cref="BundleTrust.None"/>.</param>
    /// <param name="outsideCheckpoint">A checkpoint note that the reader kept: bytes of the signed note; or null.</param>
    public static BundleReport Verify(Stream bundle, BundleTrust trust, byte[]? outsideCheckpoint = null)
    {
        ArgumentNullException.ThrowIfNull(bundle);
        using var content = new MemoryStream();
        var buffer = new byte[1 << 16];
        for (int read; (read = bundle.Read(buffer)) > 0;)
        {
            if (content.Length + read > MostBytes)
            {
                return Refuse(new BundleFault(BundlePart.Container, "zip file", $"it has more than {MostBytes} bytes"));
            }

            content.Write(buffer, 0, read);
        }

        return Verify(content.GetBuffer().AsMemory(0, (int)content.Length), trust, outsideCheckpoint);
    }

    /// <summary>Verifies a bundle in memory.</summary>
    /// <param name="bundle">The zip file.</param>
    /// <param name="trust">Trust anchors from outside, or <see cref="BundleTrust.None"/>.</param>
    /// <param name="outsideCheckpoint">A checkpoint note that the reader kept: bytes of the signed note; or null.</param>
    public static BundleReport Verify(ReadOnlyMemory<byte> bundle, BundleTrust trust, byte[]? outsideCheckpoint = null)
    {
        ArgumentNullException.ThrowIfNull(trust);
        var (outside, unusable) = Outside(outsideCheckpoint);
        if (unusable is not null)
        {
            return new BundleReport(BundleOutcome.Usage, [unusable], [], [], Findings.NoSignatures);
        }

        try
        {
            var entries = new StoredZipReader(bundle).Read();
            return Verify(new BundleFiles(entries), trust, outside);
        }
        catch (BundleFaultException fault)
        {
            return Refuse(fault.Fault);
        }
    }

    private static BundleReport Verify(BundleFiles files, BundleTrust trust, (SignedNote Note, Checkpoint Checkpoint)? outside)
    {
        var findings = new Findings();
        var index = CheckIndex(files);
        var keys = TrustedKeys.Choose(files, trust, index.Origin, findings);
        CheckNote(files, index, keys);
        var ledger = LedgerCheck.Run(files, index, keys, outside, findings);
        ContentCheck.Run(files, ledger, findings);
        SignatureCheck.Run(files, ledger, trust, findings);
        return findings.Report();
    }

    /// <summary>The list and the file have to name the same entries in the same order, with the same bytes.</summary>
    private static BundleIndex CheckIndex(BundleFiles files)
    {
        var index = BundleIndex.Parse(files.Require(BundleNames.Index, BundlePart.Index).Span) switch
        {
            Parsed<BundleIndex>.Bad(var reason) => throw Fault(BundleNames.Index, reason),
            var good => good.Require(),
        };
        var expected = index.Entries.Select(e => e.Name).Append(BundleNames.Index).Append(BundleNames.Note).ToList();
        var actual = files.Names;
        foreach (var name in actual.Except(expected))
        {
            throw Fault(name, "the entry is not on the list in bundle.json");
        }

        foreach (var name in expected.Except(actual))
        {
            throw Fault(name, "the entry is on the list in bundle.json, but not in the file");
        }

        if (!expected.SequenceEqual(actual))
        {
            throw Fault(actual.Zip(expected).First(p => p.First != p.Second).First, "the entry is not at its place in the list of bundle.json");
        }

        foreach (var item in index.Entries)
        {
            var content = files[item.Name];
            if (content.Length != item.Size || Digest.Of(content.Span) is var hash && hash != item.Hash)
            {
                throw Fault(item.Name, $"it has {content.Length} bytes with SHA-256 {Digest.Of(content.Span)}, bundle.json says {item.Size} bytes with {item.Hash}");
            }
        }

        return files.Require(BundleNames.Sums, BundlePart.Index).Span.SequenceEqual(BundleIndex.Sums(index.Entries))
            ? index
            : throw Fault(BundleNames.Sums, "it does not list the same hashes as bundle.json");
    }

    private static void CheckNote(BundleFiles files, BundleIndex index, TrustedKeys keys)
    {
        var bytes = files.Require(BundleNames.Note, BundlePart.Index);
        if (SignedNote.Parse(bytes.Span) is not Parsed<SignedNote>.Good(var note) || !note.ToBytes().AsSpan().SequenceEqual(bytes.Span))
        {
            throw Fault(BundleNames.Note, "it is no signed note");
        }

        if (note.Text != BundleIndex.NoteText(index.Origin, files[BundleNames.Index].Span))
        {
            throw Fault(BundleNames.Note, $"it signs another list than bundle.json with SHA-256 {Digest.Of(files[BundleNames.Index].Span)}");
        }

        if (keys.Refusal(note) is { } refusal)
        {
            throw Fault(BundleNames.Note, refusal);
        }
    }

    private static ((SignedNote, Checkpoint)?, BundleFault?) Outside(byte[]? bytes)
    {
        if (bytes is null)
        {
            return (null, null);
        }

        var reason = SignedNote.Parse(bytes) switch
        {
            Parsed<SignedNote>.Bad(var fault) => fault,
            var note => Checkpoint.Parse(note.Require().Text) is Parsed<Checkpoint>.Bad(var fault) ? fault : null,
        };
        if (reason is not null)
        {
            return (null, new BundleFault(BundlePart.OutsideCheckpoint, "your checkpoint", reason));
        }

        var good = SignedNote.Parse(bytes).Require();
        return ((good, Checkpoint.Parse(good.Text).Require()), null);
    }

    private static BundleReport Refuse(BundleFault fault) => new(BundleOutcome.Bad, [fault], [], [], Findings.NoSignatures);

    private static BundleFaultException Fault(string entry, string detail) => new(new BundleFault(BundlePart.Index, entry, detail));
}
