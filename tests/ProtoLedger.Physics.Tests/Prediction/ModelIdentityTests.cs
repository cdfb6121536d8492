using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>The model's constant and its numbers move together.</summary>
public sealed class ModelIdentityTests
{
    /// <summary>Golden value, made by the engine itself: when it changes, raise <see cref="ModelIdentity.Version"/> and state here what it became.</summary>
    private const string Known = "2-3bd3fbd9a217b13b";

    [Fact]
    public void Current_NumbersChangedWithoutTheConstant_Fails() => Assert.Equal(Known, ModelIdentity.Current);

    [Fact]
    public void Hash_OneResultMovedInTheTwelfthDigit_Changes()
    {
        var results = Probes.Results().ToArray();
        var before = ModelIdentity.Hash(results);
        results[3] *= 1 + 1e-11;

        Assert.NotEqual(before, ModelIdentity.Hash(results));
        Assert.EndsWith(before, ModelIdentity.Current, StringComparison.Ordinal);
    }

    [Fact]
    public void Probes_CoverEveryReadoutAndPreparation()
    {
        var series = Probes.All().ToArray();

        Assert.Equal(6, series.Select(s => s.Readout.GetType()).Distinct().Count());
        Assert.Equal(4, series.SelectMany(s => s.Preparations).Select(p => p.GetType()).Distinct().Count());
    }
}
