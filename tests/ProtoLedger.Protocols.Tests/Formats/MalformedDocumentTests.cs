using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using static ProtoLedger.Protocols.Documents.DocumentKind;

namespace ProtoLedger.Protocols.Tests.Formats;

/// <summary>Documents that are wrong in one place each: the error names the place and says why.</summary>
public sealed class MalformedDocumentTests
{
    private const string Tr = "RepetitionTime: 9000";
    private const string Ti = "InversionTime: 2400, pulse: adiabatic";

    public static TheoryData<string, DocumentKind, string, string, string, string> Cases => new()
    {
        // Form
        { "unknown key", Protocol, "bodyRegion: brain", "bodyregion: brain", "/bodyregion", "unknown" },
        { "unknown key deep down", Protocol, "slices: 30", "slices: 30, slabs: 2", "/series/0/timing/slabs", "unknown in timing" },
        { "missing key", Protocol, "ageGroup: adult\n", "", "/ageGroup", "missing" },
        { "missing readout key", Protocol, "echoSpacing: 10, ", "", "/series/0/readout/echoSpacing", "missing in echoTrain" },
        { "key of another readout", Protocol, "echoSpacing: 10", "echoSpacing: 10, DiffusionBValue: 0", "/series/0/readout/DiffusionBValue", "unknown in echoTrain" },
        { "no such kind of readout", Protocol, "kind: echoTrain", "kind: spiral", "/series/0/readout/kind", "no such kind of readout" },
        { "no such kind of preparation", Protocol, "kind: inversion", "kind: tagging", "/series/0/preparations/0/kind", "no such kind of preparation" },
        { "kind of readout missing", Protocol, "kind: echoTrain, ", "", "/series/0/readout/kind", "\"kind\" is missing" },
        { "no such kind of document", Scanner, "kind: scanner", "kind: magnet", "/kind", "no such kind of document" },
        { "kind missing", Scanner, "kind: scanner\n", "", "/kind", "missing" },
        { "format from the future", Protocol, "format: 1", "format: 2", "/format", "no whole number in the allowed range" },
        { "identifier in capitals", Protocol, "id: brain-sample", "id: Brain-Sample", "/id", "not the form" },
        { "identifier too long", Protocol, "id: brain-sample", "id: " + new string('a', 65), "/id", "65 characters" },
        { "empty title", Protocol, "title: Brain, sample", "title: \"\"", "/title", "empty" },
        { "title too long", Protocol, "title: Brain, sample", "title: " + new string('t', 161), "/title", "161 characters" },
        { "control character", Protocol, "indication: Headache", "indication: \"a\\u0007b\"", "/sheet/indication", "control character" },
        { "number as a text", Protocol, Tr, "RepetitionTime: \"9000\"", "/series/0/readout/RepetitionTime", "A number in ms is needed" },
        { "text for a number", Protocol, Tr, "RepetitionTime: long", "/series/0/readout/RepetitionTime", "A number in ms is needed" },
        { "hexadecimal number", Protocol, Tr, "RepetitionTime: 0x2328", "/series/0/readout/RepetitionTime", "A number in ms is needed" },
        { "null", Protocol, Tr, "RepetitionTime: null", "/series/0/readout/RepetitionTime", "null" },
        { "empty block", Protocol, "indication: Headache\n", "indication: Headache\n  order:\n", "/sheet/order", "empty" },
        { "list for a mapping", Scanner, "limits: {minimumEchoSpacing: 3.6, maximumGradient: 45, maximumB1: 900}", "limits: [1]", "/limits", "mapping is needed" },
        { "mapping for a list", Protocol, "scanners: [linden-3t]", "scanners: {a: b}", "/scanners", "list is needed" },
        { "text for a mapping", Conditions, "b1Scale: {low: 0.85, high: 1.1}", "b1Scale: wide", "/conditions/0/b1Scale", "mapping is needed" },
        { "flag in words", DocumentKind.Catalogue, "isFat: false", "isFat: no", "/tissues/0/isFat", "true or false" },
        { "no scanner", Protocol, "scanners: [linden-3t]", "scanners: []", "/scanners", "0 items" },
        { "the same scanner twice", Protocol, "scanners: [linden-3t]", "scanners: [linden-3t, linden-3t]", "/scanners/1", "twice" },
        { "the same series twice", Protocol, "id: double", "id: fluid-nulled", "/series/1", "twice" },
        { "unknown role", Protocol, "role: physicist", "role: surgeon", "/requiredSignatures/0/role", "none of the allowed words" },
        { "unknown meaning", Protocol, "meaning: approved", "meaning: liked", "/requiredSignatures/0/meaning", "none of the allowed words" },
        { "account with a blank", Protocol, "deputies: [h.lindqvist]", "deputies: [h lindqvist]", "/requiredSignatures/0/deputies/0", "not the form" },
        { "unknown observable", Expectations, "name: residualRatio", "name: beauty", "/expectations/0/observable/name", "none of the allowed words" },
        { "unknown strength of evidence", DocumentKind.Catalogue, "evidence: recalled", "evidence: rumour", "/tissues/0/fields/1/T2/evidence", "none of the allowed words" },
        { "pulse name with a slash", Scanner, "hyperbolic-secant:", "hyperbolic/secant:", "/pulses/hyperbolic~1secant", "not the form" },

        // Ranges
        { "repetition time of zero", Protocol, Tr, "RepetitionTime: 0", "/series/0/readout/RepetitionTime", "outside the allowed range" },
        { "repetition time beyond a minute", Protocol, Tr, "RepetitionTime: 60001", "/series/0/readout/RepetitionTime", "outside the allowed range" },
        { "excitation beyond 180 degrees", Protocol, "ExcitationFlipAngle: 90", "ExcitationFlipAngle: 181", "/series/0/readout/ExcitationFlipAngle", "outside the allowed range" },
        { "refocusing of zero", Protocol, "RefocusingFlipAngles: [150]", "RefocusingFlipAngles: [0]", "/series/0/readout/RefocusingFlipAngles/0", "outside the allowed range" },
        { "half an echo", Protocol, "EchoTrainLength: 24", "EchoTrainLength: 23.5", "/series/0/readout/EchoTrainLength", "no whole number" },
        { "no slice", Protocol, "slices: 30", "slices: 0", "/series/0/timing/slices", "no whole number in the allowed range" },
        { "partial Fourier below half", Protocol, "partialFourier: 1", "partialFourier: 0.4", "/series/0/geometry/partialFourier", "outside the allowed range" },
        { "one-dimensional matrix", Protocol, "matrix: [320, 256]", "matrix: [320]", "/series/0/geometry/matrix", "1 items" },
        { "acceleration below one", Protocol, "acceleration: 2", "acceleration: 0.5", "/series/0/geometry/acceleration", "outside the allowed range" },
        { "efficiency above one", Protocol, "pulse: adiabatic", "pulse: {kind: efficiency, efficiency: 1.2}", "/series/0/preparations/0/pulse/efficiency", "outside the allowed range" },
        { "field strength of a dream", Scanner, "MagneticFieldStrength: 3", "MagneticFieldStrength: 30", "/MagneticFieldStrength", "outside the allowed range" },
        { "inflow above one", Conditions, "unpreparedInflow: [0.1, 0.3]", "unpreparedInflow: [0.1, 1.3]", "/conditions/0/unpreparedInflow/1", "outside the allowed range" },
        { "negative spread", DocumentKind.Catalogue, "sd: 100", "sd: -1", "/tissues/0/fields/0/T1/sd", "outside the allowed range" },
        { "contrast dose of a litre", Protocol, "dose: 0.1", "dose: 5", "/sheet/contrastAgent/dose", "outside the allowed range" },

        // Physics
        { "echo between echoes", Protocol, "EchoTime: 120", "EchoTime: 125", "/series/0/readout/EchoTime", "no echo of the train" },
        { "echo after the train", Protocol, "EchoTime: 120", "EchoTime: 250", "/series/0/readout/EchoTime", "no echo of the train" },
        { "two angles for 24 echoes", Protocol, "RefocusingFlipAngles: [150]", "RefocusingFlipAngles: [150, 120]", "/series/0/readout/RefocusingFlipAngles", "neither one value for all echoes" },
        { "train longer than TR", Protocol, Tr, "RepetitionTime: 2600", "/series/0/readout/RepetitionTime", "do not fit in the repetition time" },
        { "slices do not fit", Protocol, "slices: 30", "slices: 90", "/series/0/timing/concatenations", "3 concatenations are needed" },
        { "TI shorter than its pulse", Protocol, Ti, "InversionTime: 4, pulse: adiabatic", "/series/0/preparations/0/InversionTime", "leaves no room for the pulses" },
        { "inversions in the wrong order", Protocol, "InversionTime: 500", "InversionTime: 3400", "/series/1/preparations/0/InversionTime", "leaves no room for the pulses" },
        { "next inversion that does not come", Protocol, Ti, "InversionTime: 2400, inversionTimeEnd: nextInversion", "/series/0/preparations/0/inversionTimeEnd", "No inversion follows" },
        { "trigger without a rate", Protocol, "trigger: none", "trigger: cardiac", "/series/0/timing/heartRate", "needs the range of rates" },
        { "rate without a trigger", Protocol, "trigger: none", "trigger: none, heartRate: {low: 50, high: 90}", "/series/0/timing/heartRate", "without a trigger" },
        { "rates the wrong way round", Protocol, "trigger: none", "trigger: cardiac, heartRate: {low: 90, high: 50}", "/series/0/timing/heartRate/high", "below its low end" },
        { "dummies that are not played", Protocol, "state: steady", "state: afterDummies", "/series/0/timing/state", "no dummy repetition" },
        { "echoes in disorder", Protocol, "furtherEchoTimes: [2.3]", "furtherEchoTimes: [2.3, 1.2]", "/series/2/readout/furtherEchoTimes/1", "ascending order" },
        { "range of nothing", Protocol, "parameter: /readout/RepetitionTime", "parameter: /readout/Repetition", "/series/0/allowedRanges/0/parameter", "names no number" },
        { "range without its value", Protocol, "low: 8500", "low: 9500", "/series/0/allowedRanges/0", "lies outside the range" },
        { "range beyond the format", Protocol, "high: 10000", "high: 70000", "/series/0/allowedRanges/0/high", "beyond what the parameter can be" },
        { "range with an end that cannot be played", Protocol, "low: 8500", "low: 3000", "/series/0/allowedRanges/0/low", "the series cannot be played: 15 of 30 slices in a pass" },
        { "recorded at a foreign scanner", Protocol, "      linden-3t: {scan", "      birch-15t: {scan", "/series/0/recorded/birch-15t", "not assigned" },
        { "variant of itself", Protocol, "ageGroup: adult", "ageGroup: adult\nvariantOf: brain-sample", "/variantOf", "variant of itself" },
        { "T2 longer than twice T1", DocumentKind.Catalogue, "T2: {mean: 78", "T2: {mean: 1400", "/tissues/0/fields/0/T2/mean", "twice T1" },
        { "T2* longer than T2", DocumentKind.Catalogue, "T2star: {mean: 50", "T2star: {mean: 80", "/tissues/0/fields/1/T2star/mean", "longer than T2" },
        { "fields in disorder", DocumentKind.Catalogue, "fieldStrength: 1.5", "fieldStrength: 7", "/tissues/0/fields/1/fieldStrength", "ascending order" },
        { "off-resonance the wrong way round", Conditions, "offResonance: {low: -60, high: 60}", "offResonance: {low: 60, high: -60}", "/conditions/0/offResonance/high", "below its low end" },
        { "pulse beyond the scanner", Scanner, "peakB1: 800", "peakB1: 1000", "/pulses/hyperbolic-secant/peakB1", "higher peak B1" },
        { "samples without their phases", Scanner, "phase: [0, 90]", "phase: [0]", "/pulses/sampled/phase", "as many phases" },
        { "hard pulse beyond the scanner", Scanner, "{kind: sampled, duration: 2, amplitude: [100, 200], phase: [0, 90]}", "{kind: hard, flipAngle: 180, duration: 0.5}", "/pulses/sampled/duration", "higher peak B1" },
        { "inline samples without their phases", Protocol, "pulse: adiabatic", "pulse: {kind: sampled, duration: 2, amplitude: [100, 200], phase: [0]}", "/series/0/preparations/0/pulse/phase", "as many phases" },
        { "ratio without a reference", Expectations, ", reference: white-matter", "", "/expectations/0/observable/reference", "none is named" },
        { "tissue against itself", Expectations, "reference: white-matter", "reference: csf", "/expectations/0/observable/reference", "with itself" },
        { "signal of no tissue", Expectations, "name: residualRatio, tissue: csf, reference: white-matter", "name: signal", "/expectations/0/observable/tissue", "none is named" },
        { "paired limit of zero", Expectations, "basis: absolute\n    relation: atMost\n    limit: 0.6", "basis: paired\n    relation: atMost\n    limit: 0", "/expectations/0/limit", "above 0" },

        // YAML itself
        { "anchor", Protocol, "bodyRegion: brain", "bodyRegion: &b brain", "/bodyRegion", "Anchors are refused" },
        { "alias", Protocol, "ageGroup: adult", "ageGroup: *b", "/ageGroup", "Aliases are refused" },
        { "merge key", Protocol, "sheet:\n", "sheet:\n  <<: {coil: head}\n", "/sheet/<<", "Merge keys are refused" },
        { "tag", Protocol, "ageGroup: adult", "ageGroup: !!str adult", "/ageGroup", "Tags are refused" },
        { "local tag", Protocol, "ageGroup: adult", "ageGroup: !age adult", "/ageGroup", "Tags are refused" },
        { "duplicate key", Protocol, "ageGroup: adult", "ageGroup: adult\nageGroup: adult", "/ageGroup", "twice" },
        { "infinite number", Protocol, Tr, "RepetitionTime: .inf", "/series/0/readout/RepetitionTime", "not finite" },
        { "no number", Protocol, Tr, "RepetitionTime: .NaN", "/series/0/readout/RepetitionTime", "not finite" },
        { "number beyond a double", Protocol, Tr, "RepetitionTime: 1e999", "/series/0/readout/RepetitionTime", "not finite" },
        { "two documents", Protocol, "format: 1", "a: 1\n---\nformat: 1", "", "more than one document" },
        { "directive", Protocol, "format: 1", "%YAML 1.2\n---\nformat: 1", "", "Directives are refused" },
        { "key that is a list", Protocol, "bodyRegion: brain", "? [a, b]\n: brain", "", "key must be a plain text" },
        { "no YAML", Protocol, "scanners: [linden-3t]", "scanners: [linden-3t", "", "Not YAML" },
        { "tab as indent", Protocol, "sheet:\n  indication", "sheet:\n\tindication", "", "Not YAML" },
        { "NUL", Protocol, "Headache", "Head\0ache", "", "NUL" },
        { "NUL by escape", Protocol, "indication: Headache", "indication: \"a\\0b\"", "/sheet/indication", "NUL" },
        { "nested too deep", Protocol, "bodyRegion: brain", "bodyRegion: " + new string('[', 80) + new string(']', 80), "/bodyRegion" + string.Concat(Enumerable.Repeat("/0", 63)), "64 levels" },
    };

    [Theory]
    [MemberData(nameof(Cases))]
    public void ReadYaml_MalformedDocument_IsRefusedAtItsPlace(
        string what, DocumentKind kind, string old, string replacement, string pointer, string text)
    {
        var refused = Assert.IsType<ParseResult.Refused>(DocumentReader.ReadYaml(Samples.Of(kind).With(old, replacement)));
        var error = refused.Errors.FirstOrDefault(error => error.Pointer == pointer && error.Detail.Contains(text, StringComparison.Ordinal));
        Assert.True(error is not null, $"{what}: {string.Join(" | ", refused.Errors)}");
    }

    [Fact]
    public void ReadYaml_ErrorInYaml_CarriesLineAndColumn()
    {
        var refused = Assert.IsType<ParseResult.Refused>(DocumentReader.ReadYaml(Samples.Protocol.With("ageGroup: adult", "ageGroup: ADULT")));
        var error = Assert.Single(refused.Errors);
        Assert.Equal((6, 11), (error.Line, error.Column));
        Assert.Equal("\"ADULT\"", error.Value);
    }

    [Fact]
    public void ReadYaml_SlicesDoNotFit_SaysHowManyConcatenationsAreNeeded()
    {
        var refused = Assert.IsType<ParseResult.Refused>(DocumentReader.ReadYaml(Samples.Protocol.With("concatenations: 2", "concatenations: 1").With("slices: 30", "slices: 40")));
        var error = Assert.Single(refused.Errors);
        Assert.Equal(("1", "≥ 2"), (error.Value, error.Limit));
    }

    // An alias bomb of 306 bytes expands to 10^9 leaves in a reader that follows aliases.
    [Fact]
    public void ReadYaml_AliasBomb_IsRefusedAtTheFirstAnchor()
    {
        var bomb = "a: &a [x,x,x,x,x,x,x,x,x,x]\n" + string.Concat(Enumerable.Range(1, 8).Select(i =>
            $"{(char)('a' + i)}: &{(char)('a' + i)} [{string.Join(",", Enumerable.Repeat("*" + (char)('a' + i - 1), 10))}]\n"));
        var refused = Assert.IsType<ParseResult.Refused>(DocumentReader.ReadYaml(bomb));
        Assert.Equal(("/a", 1), (refused.Errors[0].Pointer, refused.Errors[0].Line));
    }

    [Fact]
    public void ReadYaml_MoreThanOneMebibyte_IsRefused()
    {
        var refused = Assert.IsType<ParseResult.Refused>(DocumentReader.ReadYaml("note: " + new string('x', 1 << 20)));
        Assert.Contains("1 MiB", refused.Errors[0].Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void ReadJson_OfAnotherKindThanAsked_IsRefused()
    {
        var bytes = Samples.Read(Samples.Scanner).CanonicalBytes;
        var refused = Assert.IsType<ParseResult.Refused>(DocumentReader.ReadJson(bytes, Protocol));
        Assert.Equal(("/kind", "protocol"), (refused.Errors[0].Pointer, refused.Errors[0].Limit));
    }

    [Theory]
    [InlineData("[]")]
    [InlineData("null")]
    [InlineData("\"text\"")]
    [InlineData("7")]
    public void ReadJson_NoMapping_IsRefused(string json)
    {
        var refused = Assert.IsType<ParseResult.Refused>(DocumentReader.ReadJson(System.Text.Encoding.UTF8.GetBytes(json)));
        Assert.Contains("mapping", refused.Errors[0].Detail, StringComparison.Ordinal);
    }
}
