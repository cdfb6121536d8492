namespace ProtoLedger.Architecture.Tests;

/// <summary>The source tree under test.</summary>
internal static class Repository
{
    public static string Root => SourceTree.Root;

    /// <summary>Source files of a project, without what the build makes.</summary>
    public static IEnumerable<string> SourcesOf(string project) =>
        Directory.EnumerateFiles(Path.Combine(Root, "src", project), "*.cs", SearchOption.AllDirectories).Where(IsSource);

    public static IEnumerable<string> Projects =>
        Directory.EnumerateDirectories(Path.Combine(Root, "src"), "ProtoLedger.*").Select(d => Path.GetFileName(d)!);

    /// <summary>A path as one reads it from the root.</summary>
    public static string Relative(string path) => Path.GetRelativePath(Root, path);

    private static bool IsSource(string path) => !path.Split('/').Any(part => part is "obj" or "bin" or "artifacts");
}
