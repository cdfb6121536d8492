using ProtoLedger.Reports.Model.Binders;
using ProtoLedger.Reports.Plots;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <summary>The words of a binder's pages.</summary>
internal static class BinderMarkdown
{
    /// <summary>The one page that answers the question; the others prove it.</summary>
    public static string Index(Binder binder, IReadOnlyList<string> gaps)
    {
        var id = binder.Identity;
        var page = new MarkdownWriter()
            .Heading(1, $"Protocol binder: {UserText.Literal(id.Site)}")
            .Paragraph($"{Scope(id)}, from {Numbers.Date(id.From)} to {Numbers.Date(id.Until)}. Made {Numbers.Time(id.MadeAt)} by {UserText.Literal(id.MadeBy)}.")
            .Heading(2, "In effect at the end of the period");
        var last = binder.Effective.Where(e => e.From < id.Until && (e.Until is null || e.Until >= id.Until)).ToList();
        if (last.Count == 0)
            page.Paragraph("Nothing: no version was effective then, as far as is recorded.");
        else
            page.Table(["Protocol", " Version", "Scanner", "Since", "Record"], last.Select(e => (IReadOnlyList<string>)
            [
                Title(e), Numbers.Whole(e.Version), Place(e), Numbers.Date(e.From), Record(e.Imported),
            ]));
        page.Heading(2, "What happened in the period")
            .Paragraph(Happened(binder))
            .Heading(2, "What is not known");
        if (gaps.Count == 0)
            page.Paragraph("No gap is known.");
        else
            page.List(gaps.Select(UserText.Literal));
        page.Heading(2, "How to check it")
            .Paragraph($"The ledger inside holds {Numbers.Whole(id.LedgerSize)} entries under the root {ReportWords.Code(id.LedgerRoot)}. Compare that root with a checkpoint that you got earlier from elsewhere: without one, a shortened or rewritten ledger cannot be told.")
            .List(
            [
                "Whole bundle: `protoledger verify bundle.zip --trust DIR`, where DIR holds the certificate of the site authority that you got from the site, not from this bundle.",
                "One signature, with OpenSSL: `openssl cms -verify -binary -inform DER -in approval.p7s -content manifest.json -CAfile site-ca.pem -purpose any -attime T -out /dev/null`, where T is the time of signing in seconds since 1970.",
                "Every file: `sha256sum -c` on the sums that the manifest names.",
            ])
            .Heading(2, "Files");
        if (binder.Files.Count == 0)
            page.Paragraph("No further file.");
        else
            page.Table(["File", "What", "SHA-256"], binder.Files.Select(f => (IReadOnlyList<string>)[ReportWords.Code(f.Name), UserText.Literal(f.What), ReportWords.Code(f.Sha256)]));
        return page.ToString();
    }

    /// <summary>What was effective where and since when, as a picture and a table, and what was loaded.</summary>
    public static string Effective(Binder binder, Figure? timeline)
    {
        var page = new MarkdownWriter().Heading(1, "What was effective, where and since when").Paragraph($"{Scope(binder.Identity)}.").Heading(2, "Effective versions");
        if (timeline is null)
            return page.Paragraph("No version was effective in the period, as far as is recorded.").ToString();
        page.Paragraph($"![{UserText.Literal(timeline.Title)}](figures/{timeline.Name})")
            .Table(
                ["Protocol", " Version", "Scanner", "From", "Until", "Recorded by", "Record", "SHA-256"],
                Ordered(binder).Select(e => (IReadOnlyList<string>)
                [
                    Title(e), Numbers.Whole(e.Version), Place(e), Numbers.Time(e.From), e.Until is { } end ? Numbers.Time(end) : "still",
                    UserText.Literal(e.RecordedBy), Record(e.Imported), ReportWords.Code(e.Sha256),
                ]))
            .Heading(2, "Entered and checked at consoles");
        return binder.Loadings.Count == 0
            ? page.Paragraph("No entry at a console is recorded.").ToString()
            : page.Table(["Protocol", " Version", "Scanner", "Step", "By", "At"], binder.Loadings.OrderBy(l => l.At).Select(l => (IReadOnlyList<string>)
            [
                ReportWords.Code(l.ProtocolId), Numbers.Whole(l.Version), UserText.Literal(l.ScannerTitle), UserText.Literal(l.Step), UserText.Literal(l.Who), Numbers.Time(l.At),
            ])).ToString();
    }

    /// <summary>Date, what, why, who, outcome; the newest first.</summary>
    public static string Log(Binder binder)
    {
        var page = new MarkdownWriter().Heading(1, "Change log").Paragraph($"{Scope(binder.Identity)}. Declined and withdrawn requests stand beside the approved ones.").Heading(2, "Changes, the newest first");
        return binder.Log.Count == 0
            ? page.Paragraph("No change is recorded.").ToString()
            : page.Table(["Date", "Document", "What", "Why", "Who", "Outcome", "Decided by"], binder.Log
                .OrderByDescending(e => e.At).ThenByDescending(e => e.Number, StringComparer.Ordinal)
                .Select(e => (IReadOnlyList<string>)
                [
                    Numbers.Date(e.At),
                    $"{UserText.Literal(e.DocumentKind)} {ReportWords.Code(e.DocumentId)}",
                    e.What.Count == 0 ? "no parameter" : string.Join("; ", e.What.Select(UserText.Literal)),
                    UserText.Literal(e.Why),
                    UserText.Literal(e.Author),
                    UserText.Literal(e.Outcome) + (e.Version is { } v ? $", version {Numbers.Whole(v)}" : "") + (e.Number.Length > 0 ? $" (request {UserText.Literal(e.Number)})" : ", not signed here")
                        + (e.Report is { } file ? $", report {ReportWords.Code(file)}" : ""),
                    UserText.Literal(e.DecidedBy) + (e.DecisionReason.Length > 0 ? $": \u201C{UserText.Literal(e.DecisionReason)}\u201D" : ""),
                ])).ToString();
    }

    /// <summary>Signatures with the roles of that time, then facts of every other kind.</summary>
    public static string Signatures(Binder binder)
    {
        var page = new MarkdownWriter().Heading(1, "Signatures and other facts").Paragraph("Roles are those that people held when they signed.").Heading(2, "Signatures");
        if (binder.Signatures.Count == 0)
            page.Paragraph("No signature was given in the period.");
        else
            page.Table(["Request", "Signed by", "Role then", "Meaning", "At", "State", "Certificate SHA-256", "File"], binder.Signatures.OrderBy(s => s.At).Select(s => (IReadOnlyList<string>)
            [
                UserText.Literal(s.Number), $"{UserText.Literal(s.Signer)} ({ReportWords.Code(s.Account)})", UserText.Literal(s.RoleThen), UserText.Literal(s.Meaning),
                Numbers.Time(s.At), UserText.Literal(s.State), ReportWords.Code(s.CertificateSha256), ReportWords.Code(s.File),
            ]));
        page.Heading(2, "Other facts of the ledger");
        return binder.OtherFacts.Count == 0
            ? page.Paragraph("None.").ToString()
            : page.Table([" Entry", "At", "Type", "By", "About"], binder.OtherFacts.OrderBy(f => f.Index).Select(f => (IReadOnlyList<string>)
            [
                Numbers.Whole(f.Index), Numbers.Time(f.At), UserText.Literal(f.Type), ReportWords.Code(f.Actor), UserText.Literal(f.Subject),
            ])).ToString();
    }

    /// <summary>Effective lines in the order of the table.</summary>
    internal static IEnumerable<EffectiveLine> Ordered(Binder binder) => binder.Effective
        .OrderBy(e => e.ProtocolId, StringComparer.Ordinal).ThenBy(e => e.ScannerId, StringComparer.Ordinal).ThenBy(e => e.From);

    private static string Scope(BinderIdentity id) =>
        $"{(id.Protocol is { } p ? $"Protocol {ReportWords.Code(p)}" : "All protocols")}, {(id.Scanner is { } s ? $"scanner {ReportWords.Code(s)}" : "all scanners")}";

    private static string Happened(Binder binder)
    {
        int Of(string outcome) => binder.Log.Count(e => e.Outcome == outcome);
        return $"{ReportWords.Count(Of("approved"), "change was approved", "changes were approved")}, {Numbers.Whole(Of("declined"))} declined, {Numbers.Whole(Of("withdrawn"))} withdrawn; "
            + $"{ReportWords.Count(Of("imported"), "version is", "versions are")} imported history. {ReportWords.Count(binder.Signatures.Count, "signature was", "signatures were")} given; "
            + $"{ReportWords.Count(binder.Loadings.Count, "entry at a console is", "entries at consoles are")} recorded.";
    }

    private static string Title(EffectiveLine line) => $"{UserText.Literal(line.Title)} ({ReportWords.Code(line.ProtocolId)})";

    private static string Place(EffectiveLine line) => line.ScannerId == "*" ? "everywhere" : UserText.Literal(line.ScannerTitle);

    private static string Record(bool imported) => imported ? "stated, not signed here" : "recorded here";
}
