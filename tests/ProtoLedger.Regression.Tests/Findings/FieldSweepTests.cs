using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Findings;

public sealed class FieldSweepTests
{
    [Fact]
    public void Map_RowsAndColumns_HoldTheNominalValueAtTheirPlace()
    {
        var input = Documents.Input();
        var key = new ObservableKey("axial-t1", "signal", "white-matter", null, ObservableKey.NominalCondition);
        var evaluation = new VersionEvaluation();
        var map = FieldSweep.Map(evaluation, input, key, [-40, 0, 40], [0.8, 1])!;
        Assert.Equal((2, 3), (map.Count, map[0].Count));
        var result = evaluation.Evaluate(input);
        Assert.Equal(result.Nominal[result.IndexOf(key)], map[1][1], 1e-12);
        Assert.True(map[0][1] < map[1][1]);
    }

    [Fact]
    public void Ranges_ConditionsDocument_AreCovered()
    {
        var (off, b1) = FieldSweep.Ranges(Documents.Input());
        Assert.Equal((-30, 30, 0.9, 1.1), (off.Low, off.High, b1.Low, b1.High));
    }

    [Fact]
    public void Values_UnknownSeries_IsNull() =>
        Assert.Null(FieldSweep.Values(new VersionEvaluation(), Documents.Input(), new("no-such-series", "signal", "csf", null, "nominal"), [new()]));
}
