namespace ProtoLedger.Application.Tests.Fixtures;

/// <summary>A small protocol store: one brain protocol with three versions, one knee protocol, two scanners, one declined proposal. Values are invented but usual.</summary>
internal static class TestStore
{
    internal const string Series = "axial-fluid-nulled-t2";

    internal const string Scanner = """
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

    internal const string Conditions = """
        format: 1
        kind: conditions
        id: brain
        title: Head at rest
        conditions:
          - {name: well-shimmed, title: well shimmed head, offResonance: {low: -30, high: 30}, b1Scale: {low: 0.9, high: 1.1}}
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
              - {fieldStrength: 1.5, T1: {mean: 660, sd: 100, source: test, evidence: seen}, T2: {mean: 78, sd: 10, source: test, evidence: seen}}
              - {fieldStrength: 3, T1: {mean: 850, sd: 120, source: test, evidence: seen}, T2: {mean: 72, sd: 9, source: test, evidence: seen}}
          - name: grey-matter
            title: Grey matter
            ageGroup: adult
            isFat: false
            protonDensity: {mean: 0.80, sd: 0.04, source: test, evidence: seen}
            fields:
              - {fieldStrength: 1.5, T1: {mean: 1150, sd: 130, source: test, evidence: seen}, T2: {mean: 92, sd: 10, source: test, evidence: seen}}
              - {fieldStrength: 3, T1: {mean: 1480, sd: 180, source: test, evidence: seen}, T2: {mean: 88, sd: 16, source: test, evidence: seen}}
          - name: csf
            title: Cerebrospinal fluid
            ageGroup: adult
            isFat: false
            protonDensity: {mean: 1, sd: 0.01, source: test, evidence: seen}
            fields:
              - {fieldStrength: 1.5, T1: {mean: 4300, sd: 400, source: test, evidence: seen}, T2: {mean: 2100, sd: 450, source: test, evidence: seen}}
              - {fieldStrength: 3, T1: {mean: 4350, sd: 350, source: test, evidence: seen}, T2: {mean: 2000, sd: 400, source: test, evidence: seen}}
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
            limit: 0.6
        """;

    private const string History = """
        format: 1
        entries:
          - {kind: scanner, id: three, version: 1, statedTime: "2021-01-01T08:00Z", statedBy: a.lindqvist, reason: installed, source: binder 1, outcome: imported}
          - {kind: scanner, id: one-five, version: 1, statedTime: "2021-01-01T08:00Z", statedBy: a.lindqvist, reason: installed, source: binder 1, outcome: imported}
          - {kind: conditions, id: brain, version: 1, statedTime: "2021-01-01T08:00Z", statedBy: a.lindqvist, reason: measured, source: binder 1, outcome: imported}
          - {kind: catalogue, id: tissues, version: 1, statedTime: "2021-01-01T08:00Z", statedBy: a.lindqvist, reason: collected, source: binder 1, outcome: imported}
          - {kind: protocol, id: brain, version: 1, statedTime: "2021-03-01T08:00Z", statedBy: t.okafor, reason: first version, source: binder 2, outcome: imported}
          - {kind: expectations, id: brain, version: 1, statedTime: "2021-03-01T09:00Z", statedBy: a.lindqvist, reason: written down, source: binder 2, outcome: imported}
          - {kind: protocol, id: knee, version: 1, statedTime: "2021-04-01T08:00Z", statedBy: t.okafor, reason: first version, source: binder 2, outcome: imported}
          - {kind: protocol, id: brain, version: 2, baseVersion: 1, statedTime: "2022-03-01T08:00Z", statedBy: t.okafor, reason: shorter echo spacing, source: binder 3, outcome: imported}
          - {kind: protocol, id: brain, proposal: brain-short, baseVersion: 2, statedTime: "2022-06-01T08:00Z", statedBy: t.okafor, reason: save time, source: binder 3, outcome: declined, decidedBy: a.lindqvist, decisionReason: fluid turned bright}
          - {kind: protocol, id: brain, version: 3, baseVersion: 2, statedTime: "2023-03-01T08:00Z", statedBy: t.okafor, reason: thinner slices, source: binder 4, outcome: imported}
        """;

    private const string People = """
        format: 1
        people:
          - {name: t.okafor, displayName: T. Okafor, role: technologist}
          - {name: l.marsh, displayName: L. Marsh, role: lead-technologist}
          - {name: a.lindqvist, displayName: A. Lindqvist, role: physicist}
          - {name: b.rao, displayName: B. Rao, role: physicist}
          - {name: r.steiner, displayName: R. Steiner, role: radiologist}
          - {name: v.osei, displayName: V. Osei, role: reviewer}
          - {name: k.admin, displayName: K. Admin, role: administrator}
        """;

    /// <summary>The brain protocol with one repetition time, echo spacing and thickness.</summary>
    internal static string Brain(double repetitionTime = 9000, double echoSpacing = 10, double thickness = 4) => FormattableString.Invariant($$"""
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
              - {kind: inversion, InversionTime: 2390}
            readout: {kind: echoTrain, RepetitionTime: {{repetitionTime}}, EchoTime: 120, ExcitationFlipAngle: 90, echoSpacing: {{echoSpacing}}, EchoTrainLength: 24, RefocusingFlipAngles: [150]}
            timing: {slices: 20, concatenations: 4}
            geometry: {dimensions: 2, FieldOfView: [230, 200], matrix: [320, 256], SliceThickness: {{thickness}}, sliceGap: 0.4, PixelBandwidth: 200, acceleration: 2}
        """);

    internal static string Knee { get; } = """
        format: 1
        kind: protocol
        id: knee
        title: Knee
        bodyRegion: knee
        ageGroup: adult
        scanners: [one-five]
        conditions: brain
        requiredSignatures: [{role: physicist, meaning: approved, deputies: []}]
        series:
          - id: sagittal-t1
            title: Sagittal T1
            readout: {kind: spinEcho, RepetitionTime: 520, EchoTime: 12, ExcitationFlipAngle: 90, RefocusingFlipAngles: [180]}
            timing: {slices: 12, concatenations: 2}
            geometry: {dimensions: 2, FieldOfView: [160, 160], matrix: [256, 192], SliceThickness: 4, PixelBandwidth: 220}
        """;

    /// <summary>Writes the store into a new folder below the system's one for temporary files.</summary>
    internal static string Write()
    {
        var folder = Directory.CreateTempSubdirectory("protoledger-store-").FullName;
        void File(string path, string text)
        {
            var file = Path.Combine(folder, path);
            Directory.CreateDirectory(Path.GetDirectoryName(file)!);
            System.IO.File.WriteAllText(file, text + "\n");
        }

        File("history.yaml", History);
        File("people.yaml", People);
        File("scanners/three/v0001.yaml", Scanner);
        File("scanners/one-five/v0001.yaml", Scanner.Replace("id: three", "id: one-five").Replace("Three", "One five").Replace("Strength: 3", "Strength: 1.5"));
        File("conditions/brain/v0001.yaml", Conditions);
        File("catalogue/tissues/v0001.yaml", Catalogue);
        File("expectations/brain/v0001.yaml", Expectations);
        File("protocols/brain/v0001.yaml", Brain(echoSpacing: 12));
        File("protocols/brain/v0002.yaml", Brain());
        File("protocols/brain/v0003.yaml", Brain(thickness: 3.5));
        File("protocols/knee/v0001.yaml", Knee);
        File("proposals/brain-short.yaml", Brain(repetitionTime: 6000));
        return folder;
    }
}
