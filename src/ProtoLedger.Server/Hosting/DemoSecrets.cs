using System.Security.Cryptography;
using System.Text.Json;

namespace ProtoLedger.Server.Hosting;

/// <summary>What demo people sign in and sign with; kept beside the data, so that every start can print it.</summary>
/// <param name="Password">Password of every demo person.</param>
/// <param name="Passphrase">Signing passphrase of every demo signer.</param>
internal sealed record DemoSecrets(string Password, string Passphrase)
{
    private const int RandomBytes = 9;

    /// <summary>What the settings ask for, else what was used before, else something random.</summary>
    public static DemoSecrets Choose(ServerOptions options, DemoSecrets? before)
    {
        var password = options.DemoPassword ?? before?.Password ?? Random();
        var passphrase = options.DemoSigningPassphrase
            ?? (options.DemoPassword is null ? before?.Passphrase ?? "sign " + Random() : "sign " + options.DemoPassword);
        return new DemoSecrets(password, passphrase);
    }

    /// <summary>What earlier starts used, or null.</summary>
    public static DemoSecrets? Read(string folder) =>
        File.Exists(FileIn(folder)) ? JsonSerializer.Deserialize<DemoSecrets>(File.ReadAllText(FileIn(folder))) : null;

    /// <summary>Keeps them in a file that only this account reads.</summary>
    public void Write(string folder)
    {
        Directory.CreateDirectory(folder);
        var options = new FileStreamOptions { Mode = FileMode.Create, Access = FileAccess.Write };
        if (!OperatingSystem.IsWindows())
            options.UnixCreateMode = UnixFileMode.UserRead | UnixFileMode.UserWrite;
        using var stream = new FileStream(FileIn(folder), options);
        JsonSerializer.Serialize(stream, this);
    }

    private static string FileIn(string folder) => Path.Combine(folder, "demo-sign-in.json");

    private static string Random() => Convert.ToBase64String(RandomNumberGenerator.GetBytes(RandomBytes)).Replace('+', '-').Replace('/', '_');
}
