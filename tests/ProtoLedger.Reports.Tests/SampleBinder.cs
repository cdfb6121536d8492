using ProtoLedger.Reports.Model.Binders;

namespace ProtoLedger.Reports.Tests;

/// <summary>A binder with stated history, a gap, a declined and a withdrawn request.</summary>
internal static class SampleBinder
{
    public static Binder Year { get; } = new(
        new BinderIdentity("Alder Hill Hospital", "brain-standard", null, Day(2026, 1, 1), Day(2026, 12, 1), Day(2026, 12, 1), "m.reyes", 412, "9f" + new string('1', 62), Day(2026, 3, 2)),
        [
            Line(5, "linden-3t", "Linden 3 T", Day(2025, 11, 3), Day(2026, 3, 2), true),
            Line(6, "linden-3t", "Linden 3 T", Day(2026, 3, 2), Day(2026, 9, 14), false),
            Line(7, "linden-3t", "Linden 3 T", Day(2026, 9, 14), null, false),
            Line(5, "birch-15t", "Birch 1.5 T", Day(2026, 2, 10), Day(2026, 5, 4), true),
            Line(7, "birch-15t", "Birch 1.5 T", Day(2026, 9, 20), null, false),
        ],
        [
            new LogEntry("", "protocol", "brain-standard", Day(2025, 11, 3), ["EchoTime 110 to 120 ms"], "sharper grey-white border", "H. Lindqvist", "imported", 5, "", "", null),
            new LogEntry("41", "protocol", "brain-standard", Day(2026, 9, 14), ["RepetitionTime 9000 to 8600 ms", "InversionTime 2400 to 2360 ms"], "one more slice fits", "Tola Okafor (t.okafor)", "approved", 7, "Ines Marchetti, Rolf Aden", "", "reports/cr-41.html"),
            new LogEntry("42", "protocol", "brain-standard", Day(2026, 11, 3), ["RepetitionTime 9000 to 6000 ms"], "shorten the morning list", "Tola Okafor (t.okafor)", "declined", null, "Ines Marchetti", "fluid is no longer dark", "reports/cr-42.html"),
            new LogEntry("43", "protocol", "brain-standard", Day(2026, 11, 9), ["EchoTrainLength 24 to 48"], "faster", "Tola Okafor (t.okafor)", "withdrawn", null, "Tola Okafor", "author's wish", null),
        ],
        [new SignatureLine("41", "Ines Marchetti", "i.marchetti", "physicist", "approved", Day(2026, 9, 14), "counts", new string('e', 64), "signatures/41-1.p7s")],
        [new LoadingLine("brain-standard", 7, "Linden 3 T", "entered", "Tola Okafor", Day(2026, 9, 15)), new LoadingLine("brain-standard", 7, "Linden 3 T", "checked", "Sven Ito", Day(2026, 9, 15))],
        [new FactLine(7, Day(2026, 3, 2), "role-changed", "admin", "t.okafor: technologist")],
        ["Console entries before 2026-09 were kept on paper and are not here."],
        [new BinderFile("reports/cr-41.html", "Report of change request 41", new string('5', 64)), new BinderFile("signatures/41-1.p7s", "Signature 1 of change request 41", new string('6', 64))]);

    private static DateTimeOffset Day(int year, int month, int day) => new(year, month, day, 0, 0, 0, TimeSpan.Zero);

    private static EffectiveLine Line(int version, string scanner, string title, DateTimeOffset from, DateTimeOffset? until, bool imported) =>
        new("brain-standard", "Brain, standard", version, scanner, title, from, until, imported ? "stated by H. Lindqvist" : "Sven Ito", imported, new string('7', 64));
}
