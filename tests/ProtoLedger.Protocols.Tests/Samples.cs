using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;

namespace ProtoLedger.Protocols.Tests;

/// <summary>Small valid documents of every kind, as canonical YAML, for tests to bend.</summary>
internal static class Samples
{
    public const string Protocol = """
        format: 1
        kind: protocol
        id: brain-sample
        title: Brain, sample
        bodyRegion: brain
        ageGroup: adult
        scanners: [linden-3t]
        conditions: brain
        requiredSignatures:
          - {role: physicist, meaning: approved, deputies: [h.lindqvist]}
        sheet:
          indication: Headache
          contrastAgent: {agent: macrocyclic gadolinium chelate, dose: 0.1, delay: 300}
        series:
          - id: fluid-nulled
            title: Axial fluid-nulled T2
            preparations:
              - {kind: inversion, InversionTime: 2400, pulse: adiabatic}
            readout: {kind: echoTrain, RepetitionTime: 9000, EchoTime: 120, ExcitationFlipAngle: 90, echoSpacing: 10, EchoTrainLength: 24, RefocusingFlipAngles: [150]}
            timing: {slices: 30, sliceOrder: interleaved, concatenations: 2, dummyRepetitions: 0, trigger: none, state: steady}
            geometry: {dimensions: 2, FieldOfView: [230, 200], matrix: [320, 256], SliceThickness: 4, sliceGap: 0.4, NumberOfAverages: 1, PixelBandwidth: 200, acceleration: 2, partialFourier: 1, phaseDirection: row}
            meanings: {InversionTime: toExcitation, RepetitionTime: cycle}
            allowedRanges:
              - {parameter: /readout/RepetitionTime, low: 8500, high: 10000}
            recorded:
              linden-3t: {scanTimeSeconds: 216, headSar: 1.1}
          - id: double
            title: Axial double inversion
            preparations:
              - {kind: inversion, InversionTime: 3300}
              - {kind: inversion, InversionTime: 500}
            readout: {kind: echoTrain, RepetitionTime: 11000, EchoTime: 20, ExcitationFlipAngle: 90, echoSpacing: 10, EchoTrainLength: 12, RefocusingFlipAngles: [150]}
            timing: {slices: 20}
            geometry: {FieldOfView: [230, 200], matrix: [256, 192], SliceThickness: 4}
          - id: opposed
            title: Opposed phase
            readout: {kind: spoiledGradientEcho, RepetitionTime: 150, EchoTime: 1.15, ExcitationFlipAngle: 70, furtherEchoTimes: [2.3]}
            timing: {slices: 16}
            geometry: {FieldOfView: [380, 300], matrix: [256, 192], SliceThickness: 6}
        """ + "\n";

    public const string Scanner = """
        format: 1
        kind: scanner
        id: linden-3t
        title: Linden 3 T
        MagneticFieldStrength: 3
        location: Linden building, room 2
        pulses:
          hyperbolic-secant: {kind: hyperbolicSecant, duration: 10.24, beta: 800, mu: 4.9, peakB1: 800}
          sampled: {kind: sampled, duration: 2, amplitude: [100, 200], phase: [0, 90]}
        limits: {minimumEchoSpacing: 3.6, maximumGradient: 45, maximumB1: 900}
        consoleWording:
          RepetitionTime: {word: TR, meaning: cycle}
        """ + "\n";

    public const string Conditions = """
        format: 1
        kind: conditions
        id: brain
        title: Brain
        conditions:
          - name: typical
            title: Typical
            offResonance: {low: -60, high: 60}
            offResonanceField: 3
            b1Scale: {low: 0.85, high: 1.1}
            unpreparedInflow: [0.1, 0.3]
        """ + "\n";

    public const string Catalogue = """
        format: 1
        kind: catalogue
        id: tissues
        title: Tissues
        tissues:
          - name: white-matter
            title: white matter
            ageGroup: adult
            isFat: false
            protonDensity: {mean: 0.69, sd: 0.04, source: table, evidence: seen}
            apparentDiffusionCoefficient: {mean: 0.72, sd: 0.08, source: table, evidence: seen}
            fields:
              - fieldStrength: 1.5
                T1: {mean: 660, sd: 100, source: table, evidence: seen}
                T2: {mean: 78, sd: 10, source: table, evidence: seen}
              - fieldStrength: 3
                T1: {mean: 850, sd: 120, source: table, evidence: seen}
                T2: {mean: 72, sd: 9, source: table, evidence: recalled}
                T2star: {mean: 50, sd: 6, source: table, evidence: seen}
          - name: csf
            title: cerebrospinal fluid
            ageGroup: adult
            isFat: false
            protonDensity: {mean: 1, sd: 0.02, source: reference, evidence: estimated}
            fields:
              - fieldStrength: 3
                T1: {mean: 4350, sd: 350, source: table, evidence: seen}
                T2: {mean: 2000, sd: 400, source: table, evidence: seen}
        """ + "\n";

    public const string Expectations = """
        format: 1
        kind: expectations
        id: brain-sample
        title: Brain, sample
        protocol: brain-sample
        expectations:
          - id: fluid-dark
            title: Fluid stays dark
            why: Lesions beside ventricles must stand out.
            series: fluid-nulled
            observable: {name: residualRatio, tissue: csf, reference: white-matter}
            conditions: [typical]
            basis: absolute
            relation: atMost
            limit: 0.6
        """ + "\n";

    public static string Of(DocumentKind kind) => kind switch
    {
        DocumentKind.Protocol => Protocol,
        DocumentKind.Scanner => Scanner,
        DocumentKind.Conditions => Conditions,
        DocumentKind.Catalogue => Catalogue,
        _ => Expectations,
    };

    public static ParseResult.Parsed Read(string yaml)
    {
        var result = DocumentReader.ReadYaml(yaml);
        return result as ParseResult.Parsed
            ?? throw new InvalidOperationException(string.Join("\n", ((ParseResult.Refused)result).Errors) + "\n" + yaml);
    }

    /// <summary>A sample with one piece of its text replaced, which must be there.</summary>
    public static string With(this string yaml, string old, string replacement)
    {
        Assert.Contains(old, yaml, StringComparison.Ordinal);
        var at = yaml.IndexOf(old, StringComparison.Ordinal);
        return yaml[..at] + replacement + yaml[(at + old.Length)..];
    }
}
