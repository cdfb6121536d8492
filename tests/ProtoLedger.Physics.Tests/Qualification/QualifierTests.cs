using ProtoLedger.Physics.Qualification;

namespace ProtoLedger.Physics.Tests.Qualification;

/// <summary>Every vector of every reference file; origin of the files: Reference/README.md.</summary>
public sealed class QualifierTests
{
    private static readonly string Folder = Path.Combine(AppContext.BaseDirectory, "Qualification", "Reference");

    public static TheoryData<string, string> Cases()
    {
        var data = new TheoryData<string, string>();
        foreach (var path in Directory.GetFiles(Folder, "*.json").Order(StringComparer.Ordinal))
            foreach (var testCase in Read(Path.GetFileNameWithoutExtension(path)).Cases)
                data.Add(Path.GetFileNameWithoutExtension(path), testCase.Id);
        return data;
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void Evaluate_ReferenceCase_IsWithinTolerance(string family, string id)
    {
        var file = Read(family);
        var report = Qualifier.Evaluate(file with { Cases = [.. file.Cases.Where(c => c.Id == id)] });

        var result = Assert.Single(report.Cases);
        Assert.Null(result.Error);
        Assert.NotEmpty(result.Quantities);
        Assert.All(result.Quantities, q => Assert.True(q.Verdict == QuantityVerdict.Within, $"{q.Name}: off by {q.Deviation}, allowed {q.Tolerance}"));
    }

    [Fact]
    public void Evaluate_WrongExpectation_IsOutside()
    {
        var file = QualificationFile.Read(
            """
            {"family": "spin_echo", "cases": [{"id": "x", "inputs": {"T1_ms": 1000, "T2_ms": 100, "TR_ms": 500, "TE_ms": 10, "flip_deg": 90, "refocus_deg": 180},
             "expected": {"signal": 0.9}, "tolerance": {"absolute": 1e-6}}]}
            """);

        var report = Qualifier.Evaluate(file);

        Assert.False(report.Passed);
        Assert.Equal(QuantityVerdict.Outside, report.Cases[0].Quantities[0].Verdict);
    }

    [Fact]
    public void Evaluate_OnlyQuestion_GivesTheNumbersAlone()
    {
        var file = QualificationFile.Read(
            """
            {"family": "multi_echo_spin_echo", "cases": [{"id": "x", "inputs": {"T1_ms": 1000, "T2_ms": 100, "esp_ms": 10, "n_echoes": 3, "refocus_deg": 180},
             "question": ["echoes", "mz_before_excitation"]}]}
            """);

        var quantities = Qualifier.Evaluate(file).Cases[0].Quantities;

        Assert.Equal(["echoes", "mz_before_excitation"], quantities.Select(q => q.Name));
        Assert.All(quantities, q => Assert.Equal(QuantityVerdict.Asked, q.Verdict));
        Assert.Equal(Math.Exp(-0.1), quantities[0].Computed[0], 12);
    }

    [Fact]
    public void Evaluate_UnknownFamily_IsNotBuilt()
    {
        var report = Qualifier.Evaluate(QualificationFile.Read("""{"family": "spiral", "cases": []}"""));

        Assert.False(report.IsBuilt);
        Assert.False(report.Passed);
    }

    [Fact]
    public void Evaluate_MissingInput_NamesIt()
    {
        var report = Qualifier.Evaluate(QualificationFile.Read(
            """{"family": "spin_echo", "cases": [{"id": "x", "inputs": {"T1_ms": 1000, "T2_ms": 100, "TE_ms": 10}, "question": ["signal"]}]}"""));

        Assert.Equal("/TR_ms: a number is needed.", report.Cases[0].Error);
    }

    [Theory]
    [InlineData("{", "not JSON")]
    [InlineData("""{"cases": []}""", "/family")]
    [InlineData("""{"family": "x", "cases": [{"id": "a"}]}""", "/cases/0/inputs")]
    [InlineData("""{"family": "x", "cases": [{"id": "a", "inputs": {}, "expected": {"s": "b"}}]}""", "/cases/0/expected/s")]
    public void Read_Malformed_NamesThePlace(string json, string place)
    {
        var error = Assert.Throws<FormatException>(() => QualificationFile.Read(json));

        Assert.Contains(place, error.Message, StringComparison.Ordinal);
    }

    private static QualificationFile Read(string family) => QualificationFile.Read(File.ReadAllText(Path.Combine(Folder, family + ".json")));
}
