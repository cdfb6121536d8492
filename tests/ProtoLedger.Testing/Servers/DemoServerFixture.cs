using Microsoft.Extensions.DependencyInjection;
using ProtoLedger.Application.Importing;
using ProtoLedger.Protocols.Store;

namespace ProtoLedger.Testing.Servers;

/// <summary>A server with the protocol store, the people of its demonstration and working workers.</summary>
public class DemoServerFixture : StoreServerFixture
{
    /// <inheritdoc/>
    protected override bool Works => true;

    /// <inheritdoc/>
    protected override bool Demo => true;

    /// <inheritdoc/>
    public override async ValueTask InitializeAsync()
    {
        await base.InitializeAsync();
        var people = StoreReader.ReadPeople(await File.ReadAllTextAsync(Path.Combine(Store, "people.yaml"))).Require();
        await Services.GetRequiredService<PrepareDemo>().RunAsync(people, Password, Passphrase, CancellationToken.None);
    }
}
