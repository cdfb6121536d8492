using ProtoLedger.Protocols.Documents;
using static ProtoLedger.Protocols.Formats.V1.Shapes.Make;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>Shapes of the five kinds of document.</summary>
internal static class DocumentShapes
{
    public const int Format = 1;

    public static readonly string[] Roles =
        ["technologist", "lead-technologist", "physicist", "radiologist", "reviewer", "administrator"];

    private static readonly string[] Meanings =
        ["authored", "reviewed", "approved", "clinically-accepted", "ready-to-load"];

    public static ObjectShape Protocol { get; } = Document(
        "protocol",
        Required("bodyRegion", Identifier, "body region", "BodyPartExamined", "(0018,0015)"),
        Required("ageGroup", Identifier, "age group"),
        Optional("variantOf", Identifier, "variant of"),
        Required("scanners", List(Identifier, 1, 64, ""), "scanners"),
        Required("conditions", Identifier, "conditions"),
        Required("requiredSignatures", List(Signature(), 1, 8, "role", "meaning"), "required signatures"),
        Optional("sheet", Sheet(), "sheet"),
        Required("series", List(Series(), 1, 32, "id"), "series"));

    public static ObjectShape Scanner { get; } = Document(
        "scanner",
        Required("MagneticFieldStrength", Above(0, 10, "T"), "field strength", "MagneticFieldStrength", "(0018,0087)"),
        Required("location", Title, "location"),
        Required("pulses", new MapShape(PulseName, PulseShapes.Pulse, 64), "pulses"),
        Required(
            "limits",
            Line(
                "limits",
                Required("minimumEchoSpacing", Above(0, 100, "ms"), "minimum echo spacing"),
                Required("maximumGradient", Above(0, 500, "mT/m"), "maximum gradient"),
                Required("maximumB1", Above(0, 5000, "Hz"), "maximum B1")),
            "limits"),
        Required(
            "consoleWording",
            new MapShape(PulseName, Line("wording", Required("word", Title, "console word"), Optional("meaning", Title, "meaning")), 128),
            "console wording"));

    public static ObjectShape Conditions { get; } = Document(
        "conditions",
        Required(
            "conditions",
            List(
                Block(
                    "condition",
                    Required("name", Identifier, "name"),
                    Required("title", Title, "title"),
                    Required("offResonance", SeriesShapes.Range(From(-5000, 5000, "Hz"), "off-resonance"), "off-resonance"),
                    Optional("offResonanceField", Above(0, 10, "T"), "field at which the off-resonance is stated"),
                    Required("b1Scale", SeriesShapes.Range(Above(0, 3), "B1 scale"), "B1 scale"),
                    Optional("unpreparedInflow", List(From(0, 1), 0, 8), "unprepared inflow fractions")),
                1,
                64,
                "name"),
            "conditions"));

    public static ObjectShape Catalogue { get; } = Document(
        "catalogue",
        Required(
            "tissues",
            List(
                Block(
                    "tissue",
                    Required("name", Identifier, "name"),
                    Required("title", Title, "title"),
                    Required("ageGroup", Identifier, "age group"),
                    Required("isFat", new FlagShape(), "fat"),
                    Required("protonDensity", Measured(Above(0, 2), 2, ""), "proton density"),
                    Optional("apparentDiffusionCoefficient", Measured(Above(0, 20, "10⁻³ mm²/s"), 20, "10⁻³ mm²/s"), "diffusion coefficient"),
                    Required(
                        "fields",
                        List(
                            Block(
                                "values at one field",
                                Required("fieldStrength", Above(0, 10, "T"), "field strength"),
                                Required("T1", Measured(Above(0, 20000, "ms"), 20000, "ms"), "T1"),
                                Required("T2", Measured(Above(0, 20000, "ms"), 20000, "ms"), "T2"),
                                Optional("T2star", Measured(Above(0, 20000, "ms"), 20000, "ms"), "T2*")),
                            1,
                            16,
                            "fieldStrength"),
                        "values by field strength")),
                1,
                256,
                "name",
                "ageGroup"),
            "tissues"));

    public static ObjectShape Expectations { get; } = Document(
        "expectations",
        Required("protocol", Identifier, "protocol"),
        Required(
            "expectations",
            List(
                Block(
                    "expectation",
                    Required("id", Identifier, "identifier"),
                    Required("title", Title, "title"),
                    Required("why", Prose, "why"),
                    Required("series", Identifier, "series"),
                    Required(
                        "observable",
                        Line(
                            "observable",
                            Required("name", OneOf([.. ObservableNames.All]), "observable"),
                            Optional("tissue", Identifier, "tissue"),
                            Optional("reference", Identifier, "reference tissue")),
                        "observable"),
                    Required("conditions", List(Identifier, 1, 16, ""), "conditions"),
                    Required("basis", OneOf("absolute", "paired"), "basis"),
                    Required("relation", OneOf("atMost", "atLeast"), "relation"),
                    Required("limit", From(-1e6, 1e6), "limit"),
                    Optional("scanners", List(Identifier, 0, 64, ""), "scanners")),
                1,
                64,
                "id"),
            "expectations"));

    public static ObjectShape Of(DocumentKind kind) => kind switch
    {
        DocumentKind.Protocol => Protocol,
        DocumentKind.Scanner => Scanner,
        DocumentKind.Conditions => Conditions,
        DocumentKind.Catalogue => Catalogue,
        DocumentKind.Expectations => Expectations,
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "No such kind of document."),
    };

    private static ObjectShape Document(string kind, params Member[] members) => Block(
        kind,
        [
            Required("format", Whole(Format, Format), "format"),
            Required("kind", OneOf(kind), "kind"),
            Required("id", Identifier, "identifier"),
            Required("title", Title, "title"),
            Optional("note", Prose, "note"),
            .. members,
        ]);

    private static ObjectShape Signature() => Line(
        "required signature",
        Required("role", OneOf(Roles), "role"),
        Required("meaning", OneOf(Meanings), "meaning"),
        Optional("deputies", List(Account, 0, 16, ""), "deputies"));

    private static ObjectShape Sheet() => Block(
        "sheet",
        Optional("indication", Prose, "indication"),
        Optional("coil", Prose, "coil", "ReceiveCoilName", "(0018,1250)"),
        Optional("positioning", Prose, "positioning"),
        Optional("coverage", Prose, "coverage"),
        Optional("landmarks", Prose, "landmarks"),
        Optional(
            "contrastAgent",
            Line(
                "contrast agent",
                Required("agent", Title, "contrast agent", "ContrastBolusAgent", "(0018,0010)"),
                Required("dose", Above(0, 1, "mmol/kg"), "contrast dose"),
                Required("delay", From(0, 7200, "s"), "contrast delay")),
            "contrast agent"),
        Optional("order", Prose, "order of the series"),
        Optional("fallback", Prose, "fallback"));

    private static ObjectShape Series() => Block(
        "series",
        Required("id", Identifier, "identifier"),
        Required("title", Title, "series title", "SeriesDescription", "(0008,103E)"),
        Optional("note", Prose, "note"),
        Optional("preparations", List(SeriesShapes.Preparation, 0, 8, "kind") with { Distinct = false }, "preparations"),
        Required("readout", SeriesShapes.Readout, "readout"),
        Required("timing", SeriesShapes.Timing, "timing"),
        Required("geometry", SeriesShapes.Geometry, "geometry"),
        Optional("meanings", new MapShape(PulseName, Title, 32) , "meanings"),
        Optional(
            "allowedRanges",
            List(
                Line(
                    "allowed range",
                    Required("parameter", new TextShape(128), "parameter"),
                    Required("low", From(-1e6, 1e6), "lowest allowed value"),
                    Required("high", From(-1e6, 1e6), "highest allowed value")),
                0,
                32,
                "parameter"),
            "allowed ranges"),
        Optional("recorded", new MapShape(Identifier, Recorded(), 64), "values recorded at the console"),
        Optional("contrastConcentration", From(0, 20, "mmol/l"), "contrast agent concentration in tissue"));

    private static ObjectShape Recorded() => Line(
        "recorded values",
        Optional("scanTimeSeconds", Above(0, 7200, "s"), "recorded scan time", "AcquisitionDuration", "(0018,9073)"),
        Optional("headSar", From(0, 20, "W/kg"), "recorded head SAR"),
        Optional("wholeBodySar", From(0, 20, "W/kg"), "recorded whole-body SAR", "SAR", "(0018,1316)"),
        Optional("b1Rms", From(0, 20, "µT"), "recorded B1 rms"),
        Optional("minimumEchoTime", Above(0, 1000, "ms"), "recorded minimum echo time"));

    private static ObjectShape Measured(NumberShape mean, double highestSd, string unit) => Line(
        "measured value",
        Required("mean", mean, "mean"),
        Required("sd", From(0, highestSd, unit), "standard deviation"),
        Required("source", Prose, "source"),
        Required("evidence", OneOf("seen", "secondHand", "recalled", "estimated"), "evidence"));
}
