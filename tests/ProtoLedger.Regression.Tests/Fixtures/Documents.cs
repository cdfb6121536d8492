using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Tests.Fixtures;

/// <summary>A small invented hospital: brain protocol, two scanners, conditions, catalogue, expectations.</summary>
internal static class Documents
{
    internal const string FluidNulled = "axial-fluid-nulled-t2";

    internal const string Brain = """
        format: 1
        kind: protocol
        id: brain
        title: Brain
        bodyRegion: brain
        ageGroup: adult
        scanners: [three, one-five]
        conditions: brain
        requiredSignatures:
          - {role: physicist, meaning: approved, deputies: []}
        series:
          - id: axial-fluid-nulled-t2
            title: Axial fluid-nulled T2
            preparations:
              - {kind: inversion, InversionTime: 2404}
            readout: {kind: echoTrain, RepetitionTime: 9000, EchoTime: 100, ExcitationFlipAngle: 90, echoSpacing: 10, EchoTrainLength: 24, RefocusingFlipAngles: [150]}
            timing: {slices: 26, concatenations: 2}
            geometry: {dimensions: 2, FieldOfView: [230, 200], matrix: [320, 256], SliceThickness: 4, sliceGap: 0.4, PixelBandwidth: 200, acceleration: 2}
          - id: axial-t1
            title: Axial T1
            readout: {kind: spinEcho, RepetitionTime: 520, EchoTime: 12, ExcitationFlipAngle: 90, RefocusingFlipAngles: [180]}
            timing: {slices: 22, concatenations: 2}
            geometry: {dimensions: 2, FieldOfView: [230, 200], matrix: [256, 192], SliceThickness: 5, PixelBandwidth: 220}
          - id: axial-t2star
            title: Axial T2* gradient echo
            readout: {kind: spoiledGradientEcho, RepetitionTime: 650, EchoTime: 20, ExcitationFlipAngle: 20}
            timing: {slices: 22}
            geometry: {dimensions: 2, FieldOfView: [230, 200], matrix: [256, 192], SliceThickness: 5, PixelBandwidth: 180}
        """;

    /// <summary>The brain protocol with a range in which the console may set the repetition time.</summary>
    internal static string BrainWithRange(double low, double high) => Brain.Replace(
        "sliceGap: 0.4, PixelBandwidth: 200, acceleration: 2}",
        System.FormattableString.Invariant($"sliceGap: 0.4, PixelBandwidth: 200, acceleration: 2}}\n    allowedRanges: [{{parameter: /readout/RepetitionTime, low: {low}, high: {high}}}]"),
        StringComparison.Ordinal);

    internal const string Three = """
        format: 1
        kind: scanner
        id: three
        title: Three
        MagneticFieldStrength: 3
        location: Room 1
        pulses: {}
        limits: {minimumEchoSpacing: 6, maximumGradient: 45, maximumB1: 900}
        consoleWording: {RepetitionTime: {word: TR}}
        """;

    internal const string OneFive = """
        format: 1
        kind: scanner
        id: one-five
        title: One five
        MagneticFieldStrength: 1.5
        location: Room 2
        pulses: {}
        limits: {minimumEchoSpacing: 6, maximumGradient: 33, maximumB1: 900}
        consoleWording: {}
        """;

    internal const string Conditions = """
        format: 1
        kind: conditions
        id: brain
        title: Head at rest
        conditions:
          - {name: well-shimmed, title: well shimmed head, offResonance: {low: -30, high: 30}, b1Scale: {low: 0.9, high: 1.1}}
          - {name: pulsation, title: pulsating fluid, offResonance: {low: 0, high: 0}, b1Scale: {low: 1, high: 1}, unpreparedInflow: [0.2]}
        """;

    internal const string Catalogue = """
        format: 1
        kind: catalogue
        id: tissues
        title: Tissues
        tissues:
          - name: white-matter
            title: White matter
            ageGroup: adult
            isFat: false
            protonDensity: {mean: 0.69, sd: 0.04, source: test, evidence: seen}
            fields:
              - {fieldStrength: 1.5, T1: {mean: 660, sd: 100, source: test, evidence: seen}, T2: {mean: 78, sd: 10, source: test, evidence: seen}, T2star: {mean: 64, sd: 8, source: test, evidence: seen}}
              - {fieldStrength: 3, T1: {mean: 850, sd: 120, source: test, evidence: seen}, T2: {mean: 72, sd: 9, source: test, evidence: seen}, T2star: {mean: 50, sd: 6, source: test, evidence: seen}}
          - name: grey-matter
            title: Grey matter
            ageGroup: adult
            isFat: false
            protonDensity: {mean: 0.80, sd: 0.04, source: test, evidence: seen}
            fields:
              - {fieldStrength: 1.5, T1: {mean: 1150, sd: 130, source: test, evidence: seen}, T2: {mean: 92, sd: 10, source: test, evidence: seen}, T2star: {mean: 82, sd: 8, source: test, evidence: seen}}
              - {fieldStrength: 3, T1: {mean: 1480, sd: 180, source: test, evidence: seen}, T2: {mean: 88, sd: 16, source: test, evidence: seen}, T2star: {mean: 58, sd: 10, source: test, evidence: seen}}
          - name: csf
            title: Cerebrospinal fluid
            ageGroup: adult
            isFat: false
            protonDensity: {mean: 1, sd: 0.01, source: test, evidence: seen}
            fields:
              - {fieldStrength: 1.5, T1: {mean: 4300, sd: 400, source: test, evidence: seen}, T2: {mean: 2100, sd: 450, source: test, evidence: seen}, T2star: {mean: 500, sd: 300, source: test, evidence: estimated}}
              - {fieldStrength: 3, T1: {mean: 4350, sd: 350, source: test, evidence: seen}, T2: {mean: 2000, sd: 400, source: test, evidence: seen}, T2star: {mean: 400, sd: 250, source: test, evidence: estimated}}
          - name: lesion
            title: Lesion
            ageGroup: adult
            isFat: false
            protonDensity: {mean: 0.85, sd: 0.06, source: test, evidence: recalled}
            fields:
              - {fieldStrength: 1.5, T1: {mean: 1150, sd: 280, source: test, evidence: recalled}, T2: {mean: 150, sd: 50, source: test, evidence: recalled}, T2star: {mean: 100, sd: 40, source: test, evidence: recalled}}
              - {fieldStrength: 3, T1: {mean: 1400, sd: 320, source: test, evidence: recalled}, T2: {mean: 140, sd: 45, source: test, evidence: recalled}}
          - name: fat
            title: Fat
            ageGroup: adult
            isFat: true
            protonDensity: {mean: 0.90, sd: 0.10, source: test, evidence: recalled}
            fields:
              - {fieldStrength: 1.5, T1: {mean: 290, sd: 50, source: test, evidence: seen}, T2: {mean: 85, sd: 40, source: test, evidence: seen}, T2star: {mean: 25, sd: 10, source: test, evidence: recalled}}
              - {fieldStrength: 3, T1: {mean: 375, sd: 30, source: test, evidence: seen}, T2: {mean: 90, sd: 45, source: test, evidence: seen}, T2star: {mean: 18, sd: 8, source: test, evidence: recalled}}
        """;

    internal const string Expectations = """
        format: 1
        kind: expectations
        id: brain
        title: Brain
        protocol: brain
        expectations:
          - id: fluid-dark
            title: ventricles and sulci stay dark
            why: lesions beside fluid would be missed
            series: axial-fluid-nulled-t2
            observable: {name: residualRatio, tissue: csf, reference: white-matter}
            conditions: [well-shimmed]
            basis: absolute
            relation: atMost
            limit: 0.46
          - id: no-brighter-fluid
            title: fluid no brighter than before
            why: readers know the look
            series: axial-fluid-nulled-t2
            observable: {name: residualRatio, tissue: csf, reference: white-matter}
            conditions: [nominal]
            basis: paired
            relation: atMost
            limit: 1.05
          - id: no-such-value
            title: lesion seen on gradient echo
            why: bleeding
            series: axial-t2star
            observable: {name: contrastRatio, tissue: lesion, reference: white-matter}
            conditions: [well-shimmed]
            basis: absolute
            relation: atLeast
            limit: 1.1
        """;

    internal static HashedDocument<T> Read<T>(string yaml)
        where T : LedgerDocument => DocumentReader.ReadYaml(yaml) switch
        {
            ParseResult.Parsed parsed => HashedDocument.From<T>(parsed),
            ParseResult.Refused(var errors) => throw new InvalidOperationException(string.Join("\n", errors)),
            var other => throw new InvalidOperationException(other.GetType().Name),
        };

    internal static EvaluationInput Input(string scanner = Three, string protocol = Brain, string? expectations = Expectations, string catalogue = Catalogue, string conditions = Conditions) => new(
        Read<ProtocolDocument>(protocol),
        Read<ScannerDocument>(scanner),
        Read<ConditionsDocument>(conditions),
        Read<CatalogueDocument>(catalogue),
        expectations is null ? null : Read<ExpectationsDocument>(expectations),
        SamplePlan.Default);

    /// <summary>The input with values set in its protocol.</summary>
    internal static EvaluationInput With(this EvaluationInput input, params (string Pointer, double Value)[] settings) => input with
    {
        Protocol = ParameterEdit.Apply(input.Protocol.CanonicalBytes, settings.Select(s => new ParameterSetting(s.Pointer, s.Value))) switch
        {
            ParseResult.Parsed parsed => HashedDocument.From<ProtocolDocument>(parsed),
            ParseResult.Refused(var errors) => throw new InvalidOperationException(string.Join("\n", errors)),
            var other => throw new InvalidOperationException(other.GetType().Name),
        },
    };
}
