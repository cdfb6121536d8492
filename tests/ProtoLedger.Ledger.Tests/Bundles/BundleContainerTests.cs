using System.Buffers.Binary;
using System.IO.Compression;
using System.Text;
using ProtoLedger.Ledger.Bundles;

namespace ProtoLedger.Ledger.Tests.Bundles;

/// <summary>Zip slip, bombs, hidden and doubled entries, links: refused before anything is unpacked.</summary>
public sealed class BundleContainerTests : IDisposable
{
    private readonly TestBundle made = new();

    public void Dispose() => made.Dispose();

    [Fact]
    public void Bundle_IsAZipThatTheUsualReaderOpens()
    {
        using var zip = new ZipArchive(new MemoryStream(made.ToBytes()));
        using var reader = new StreamReader(zip.GetEntry(BundleNames.FirstPage)!.Open());
        Assert.Contains("Binder", reader.ReadToEnd(), StringComparison.Ordinal);
        Assert.Equal(new Rezip(made.ToBytes()).Names, zip.Entries.Select(e => e.FullName));
    }

    [Theory]
    [InlineData("../evil.html")]
    [InlineData("pages/../../evil.html")]
    [InlineData("/etc/passwd")]
    [InlineData("C:\\evil.html")]
    [InlineData("pages\\evil.html")]
    [InlineData("pages//evil.html")]
    [InlineData("pages/./evil.html")]
    [InlineData("pages/evil.html.")]
    [InlineData("pages/.hidden")]
    [InlineData("pages/")]
    [InlineData("pages/a b.html")]
    [InlineData("pages/a\0b.html")]
    [InlineData("pages/a\nb.html")]
    [InlineData("pages/é.html")]
    [InlineData("evil.html")]
    [InlineData("ledger/more.jsonl")]
    [InlineData("")]
    public void Verify_UnsafeOrUnknownName_IsRefusedByTheContainer(string name)
    {
        var entry = new Rezip(made.ToBytes());
        var bytes = WithRawName(entry, name);
        var fault = Assert.Single(BundleVerifier.Verify(bytes, made.Trust).Faults);
        Assert.Equal(BundlePart.Container, fault.Part);
        Assert.Contains("name", fault.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Verify_VeryLongName_IsRefused() =>
        Assert.Equal(BundlePart.Container, BundleVerifier.Verify(WithRawName(new Rezip(made.ToBytes()), "pages/" + new string('a', 300)), made.Trust).Faults[0].Part);

    [Theory]
    [InlineData("pages/history.html")]
    [InlineData("pages/HISTORY.html")]
    [InlineData("INDEX.html")]
    public void Verify_NameTwiceOrDifferingInCase_IsRefused(string name)
    {
        var rezip = new Rezip(made.ToBytes());
        var bytes = (name == "INDEX.html" ? rezip.Insert(1, "Pages/x.html", []) : rezip.Insert(rezip.Names.Count() - 3, name, "x"u8.ToArray())).ToBytes();
        var fault = BundleVerifier.Verify(bytes, made.Trust).Faults[0];
        Assert.Equal(BundlePart.Container, fault.Part);
    }

    [Fact]
    public void Verify_CompressedBomb_IsRefusedByItsDeclaredSizeWithoutUnpacking()
    {
        using var output = new MemoryStream();
        using (var zip = new ZipArchive(output, ZipArchiveMode.Create, leaveOpen: true))
        {
            using var page = zip.CreateEntry("index.html", CompressionLevel.SmallestSize).Open();
            var zeros = new byte[1 << 20];
            for (var i = 0; i < 100; i++)
            {
                page.Write(zeros);
            }
        }

        var before = GC.GetAllocatedBytesForCurrentThread();
        var fault = BundleVerifier.Verify(output.ToArray(), made.Trust).Faults[0];
        Assert.Contains("compressed", fault.Detail, StringComparison.Ordinal);
        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < 5 << 20);
    }

    [Fact]
    public void Verify_DeclaredSizeBeyondTheFile_IsRefused()
    {
        var bytes = made.ToBytes();
        BinaryPrimitives.WriteUInt32LittleEndian(bytes.AsSpan(18), 0xFFFFFFF0);
        BinaryPrimitives.WriteUInt32LittleEndian(bytes.AsSpan(22), 0xFFFFFFF0);
        Assert.Contains("declares", BundleVerifier.Verify(bytes, made.Trust).Faults[0].Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Verify_UsualZipOfTheSameEntries_IsRefused()
    {
        // Another program's zip carries dates, versions and descriptors that nothing protects.
        using var output = new MemoryStream();
        using (var zip = new ZipArchive(output, ZipArchiveMode.Create, leaveOpen: true))
        {
            var rezip = new Rezip(made.ToBytes());
            foreach (var name in rezip.Names)
            {
                using var entry = zip.CreateEntry(name, CompressionLevel.NoCompression).Open();
                entry.Write(rezip[name]);
            }
        }

        Assert.Equal(BundlePart.Container, BundleVerifier.Verify(output.ToArray(), made.Trust).Faults[0].Part);
    }

    [Theory]
    [InlineData(38, 0xA1ED0000)] // external attributes: a symbolic link in the Unix half
    [InlineData(38, 0x00000010)] // external attributes: a folder in the DOS half
    [InlineData(42, 0x00000000)] // offset of another entry: two names for one content (overlap)
    public void Verify_LinkAttributeOrOverlapInTheDirectory_IsRefused(int field, uint value)
    {
        var bytes = made.ToBytes();
        var second = CentralRecord(bytes, 1);
        BinaryPrimitives.WriteUInt32LittleEndian(bytes.AsSpan(second + field), value);
        Assert.Contains("zip directory", BundleVerifier.Verify(bytes, made.Trust).Faults[0].Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Verify_EntryHiddenFromTheDirectoryOrOnlyInIt_IsRefused()
    {
        var bytes = made.ToBytes();
        var (first, second) = (CentralRecord(bytes, 0), CentralRecord(bytes, 1));
        byte[] hidden = [.. bytes.AsSpan(0, first), .. bytes.AsSpan(second)];
        Assert.Equal(BundleOutcome.Bad, BundleVerifier.Verify(hidden, made.Trust).Outcome);
        byte[] doubled = [.. bytes.AsSpan(0, second), .. bytes.AsSpan(first)];
        Assert.Equal(BundleOutcome.Bad, BundleVerifier.Verify(doubled, made.Trust).Outcome);
    }

    [Fact]
    public void Verify_CommentAppendedBytesAndPrefix_AreRefused()
    {
        var bytes = made.ToBytes();
        var comment = (byte[])[.. bytes, .. "hello"u8];
        BinaryPrimitives.WriteUInt16LittleEndian(comment.AsSpan(bytes.Length - 2), 5);
        foreach (var changed in (byte[][])[comment, [.. bytes, 0], [.. "MZ"u8, .. bytes], [.. bytes, .. bytes], []])
        {
            var report = BundleVerifier.Verify(changed, made.Trust);
            Assert.Equal(BundleOutcome.Bad, report.Outcome);
            Assert.Equal(BundlePart.Container, report.Faults[0].Part);
        }
    }

    [Fact]
    public void Verify_TruncatedAtEach64Bytes_IsRefused()
    {
        var bytes = made.ToBytes();
        for (var length = 0; length < bytes.Length; length += 64)
        {
            var report = BundleVerifier.Verify(bytes.AsMemory(0, length), made.Trust);
            Assert.Equal(BundlePart.Container, report.Faults[0].Part);
        }
    }

    [Fact]
    public void Verify_HundredThousandEntries_IsRefusedAtTheLimit()
    {
        using var output = new MemoryStream();
        for (var i = 0; i < 100_000; i++)
        {
            output.Write(StoredZip.LocalHeader(new StoredEntry($"pages/{i}.html", 0, 0, 0)));
        }

        var fault = BundleVerifier.Verify(output.ToArray(), made.Trust).Faults[0];
        Assert.Contains("at most 65000 entries", fault.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Write_UnsafeDoubledOrMissingNames_IsMisuse()
    {
        var contents = made.Contents();
        foreach (var name in (string[])["../x", "bundle.json", "INDEX.html", "x.html"])
        {
            Assert.Throws<ArgumentException>(() => made.ToBytes(contents with { Entries = [.. contents.Entries, BundleEntry.Of(name, [])] }));
        }

        Assert.Throws<ArgumentException>(() => made.ToBytes(contents with { Entries = [.. contents.Entries.Where(e => e.Name != BundleNames.FirstPage)] }));
    }

    private static byte[] WithRawName(Rezip rezip, string name)
    {
        // Local header by hand, since the product's own writer of headers takes ASCII names only.
        var raw = Encoding.UTF8.GetBytes(name);
        var header = StoredZip.LocalHeader(new StoredEntry(new string('x', raw.Length), Crc32.Of("x"u8), 1, 0));
        raw.CopyTo(header, StoredZip.LocalLength);
        return [.. header, (byte)'x', .. rezip.ToBytes()];
    }

    private static int CentralRecord(byte[] bytes, int number)
    {
        var at = (int)BinaryPrimitives.ReadUInt32LittleEndian(bytes.AsSpan(bytes.Length - 6));
        for (var i = 0; i < number; i++)
        {
            at += StoredZip.CentralLength + BinaryPrimitives.ReadUInt16LittleEndian(bytes.AsSpan(at + 28));
        }

        return at;
    }
}
