using Microsoft.Extensions.DependencyInjection;
using ProtoLedger.Application.Importing;

namespace ProtoLedger.Testing.Servers;

/// <summary>A server whose database holds the protocol store that comes with the program; no run is carried out.</summary>
public class StoreServerFixture : ServerFixture
{
    /// <summary>Folder of the protocol store.</summary>
    public static string Store => Path.Combine(AppContext.BaseDirectory, "protocol-store");

    /// <inheritdoc/>
    public override async ValueTask InitializeAsync()
    {
        await base.InitializeAsync();
        var imported = await Services.GetRequiredService<ImportStore>().RunAsync(Store, CancellationToken.None);
        if (!imported.Succeeded)
            throw new InvalidOperationException(imported.Refusal.Detail);
    }
}
