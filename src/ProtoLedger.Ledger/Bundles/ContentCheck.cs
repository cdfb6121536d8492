namespace ProtoLedger.Ledger.Bundles;

/// <summary>Each content bears its hash as name and belongs to a fact of the ledger.</summary>
internal static class ContentCheck
{
    public static void Run(BundleFiles files, LedgerCheck ledger, Findings findings)
    {
        var count = 0;
        foreach (var name in files.Names.Where(n => n.StartsWith(BundleNames.Blobs, StringComparison.Ordinal)))
        {
            count++;
            if (!Digest.TryParse(name[BundleNames.Blobs.Length..], out var hash))
            {
                findings.Wrong(BundlePart.Blob, name, "its name is no SHA-256");
            }
            else if (Digest.Of(files[name].Span) is var actual && actual != hash)
            {
                findings.Wrong(BundlePart.Blob, name, $"its SHA-256 is {actual}");
            }
            else if (!ledger.Referred.Contains(hash))
            {
                findings.Wrong(BundlePart.Blob, name, "no fact of the ledger refers to it");
            }
        }

        findings.Holds($"{count} contents of {ledger.Referred.Count} that the ledger refers to are here, each with the recorded hash");
    }
}
