using Microsoft.Extensions.Options;
using ProtoLedger.Server.Hosting;

namespace ProtoLedger.Server.Tests.Hosting;

public sealed class OptionsTests
{
    [Theory]
    [InlineData("--role=all in one", nameof(ServerOptions.Role))]
    [InlineData("--ProtoLedger:Workers=0", nameof(ServerOptions.Workers))]
    [InlineData("--ProtoLedger:Origin=two words", nameof(ServerOptions.Origin))]
    public void Setting_ThatIsNotValid_IsNamed(string argument, string name)
    {
        var error = Assert.Throws<OptionsValidationException>(() => ServerApplication.ReadOptions(ServerApplication.CreateBuilder([argument])));
        Assert.Contains(name, error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Store_ComesFromTheCommandLine()
    {
        var options = ServerApplication.ReadOptions(ServerApplication.CreateBuilder(["--store", "elsewhere", "--role", "web"]));
        Assert.Equal(("elsewhere", true, false), (options.Store, options.ServesWeb, options.Works));
    }

    [Fact]
    public void DemoSecrets_AskedFor_AreUsedAndThePassphraseFollowsThePassword()
    {
        var chosen = DemoSecrets.Choose(new ServerOptions { DemoPassword = "lantern" }, new DemoSecrets("old", "older"));
        Assert.Equal(new DemoSecrets("lantern", "sign lantern"), chosen);
    }

    [Fact]
    public void DemoSecrets_NotAskedFor_StayAsTheyWereElseAreRandom()
    {
        var before = new DemoSecrets("old", "older");
        Assert.Equal(before, DemoSecrets.Choose(new ServerOptions(), before));
        Assert.NotEqual(DemoSecrets.Choose(new ServerOptions(), null), DemoSecrets.Choose(new ServerOptions(), null));
    }
}
