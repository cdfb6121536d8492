namespace ProtoLedger.Ledger.Tests;

/// <summary>A folder that goes away with the test.</summary>
internal sealed class TemporaryFolder : IDisposable
{
    public string Path { get; } = Directory.CreateTempSubdirectory("protoledger-ledger-").FullName;

    public void Write(string name, byte[] content) => File.WriteAllBytes(System.IO.Path.Combine(Path, name), content);

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
