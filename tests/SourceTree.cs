namespace ProtoLedger.Testing;

/// <summary>The source tree from which the tests were built.</summary>
internal static class SourceTree
{
    /// <summary>The folder of the solution.</summary>
    public static string Root { get; } = Find(new DirectoryInfo(AppContext.BaseDirectory));

    /// <summary>A file or folder of the tree.</summary>
    public static string Of(params string[] parts) => Path.Combine([Root, .. parts]);

    private static string Find(DirectoryInfo? folder) =>
        folder is null ? throw new InvalidOperationException("The tests run from inside the source tree.")
        : File.Exists(Path.Combine(folder.FullName, "ProtoLedger.sln")) ? folder.FullName
        : Find(folder.Parent);
}
