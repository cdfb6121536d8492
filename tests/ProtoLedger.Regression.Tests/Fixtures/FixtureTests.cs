namespace ProtoLedger.Regression.Tests.Fixtures;

public sealed class FixtureTests
{
    [Fact]
    public void Documents_AllKinds_AreValid() => Assert.Equal(3, Documents.Input(Documents.OneFive).Protocol.Document.Series.Count);
}
