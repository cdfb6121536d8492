using System.Globalization;
using System.Text.RegularExpressions;

namespace ProtoLedger.Storage.Clusters;

/// <summary>The programs of one PostgreSQL installation.</summary>
/// <param name="Folder">Folder that holds initdb, pg_ctl and postgres.</param>
/// <param name="Major">Major version; data folders of another one cannot be opened.</param>
internal sealed partial record PostgresBinaries(string Folder, int Major)
{
    private static readonly string[] Required = ["initdb", "pg_ctl", "postgres"];

    /// <summary>Folders, with * for a version, where distributions put the programs; Debian, PGDG, Alpine, SUSE, Homebrew, own builds.</summary>
    private static readonly string[] Customary =
    [
        "/usr/lib/postgresql/*/bin", "/usr/pgsql-*/bin", "/usr/libexec/postgresql*", "/usr/lib/postgresql*/bin",
        "/usr/lib64/pgsql/bin", "/usr/local/pgsql/bin", "/opt/homebrew/opt/postgresql*/bin", "/usr/local/opt/postgresql*/bin",
    ];

    public string InitDb => Path.Combine(Folder, "initdb");

    public string PgCtl => Path.Combine(Folder, "pg_ctl");

    /// <summary>Installations of this machine, newest first.</summary>
    public static async Task<IReadOnlyList<PostgresBinaries>> FindAsync(CancellationToken cancellationToken)
    {
        var found = new List<PostgresBinaries>();
        foreach (var folder in FromPath().Concat(Customary.SelectMany(Expand)).Distinct())
        {
            if (!Required.All(name => File.Exists(Path.Combine(folder, name))))
                continue;
            var version = await Command.RunAsync(Path.Combine(folder, "postgres"), ["--version"], cancellationToken);
            if (MajorVersion().Match(version.Output) is { Success: true } match)
                found.Add(new PostgresBinaries(folder, int.Parse(match.Groups[1].Value, CultureInfo.InvariantCulture)));
        }

        return [.. found.OrderByDescending(b => b.Major)];
    }

    private static IEnumerable<string> FromPath() =>
        (Environment.GetEnvironmentVariable("PATH") ?? "")
            .Split(Path.PathSeparator, StringSplitOptions.RemoveEmptyEntries)
            .Select(folder => new FileInfo(Path.Combine(folder, "initdb")))
            .Where(file => file.Exists)
            .Select(file => (file.ResolveLinkTarget(returnFinalTarget: true) ?? file).FullName)
            .Select(file => Path.GetDirectoryName(file)!);

    private static IEnumerable<string> Expand(string pattern)
    {
        var star = pattern.IndexOf('*', StringComparison.Ordinal);
        if (star < 0)
            return [pattern];
        var parent = Path.GetDirectoryName(pattern[..star])!;
        var end = pattern.IndexOf('/', star);
        var name = pattern[(parent.Length + 1)..(end < 0 ? pattern.Length : end)];
        var rest = end < 0 ? "" : pattern[(end + 1)..];
        return Directory.Exists(parent) ? Directory.EnumerateDirectories(parent, name).Select(d => Path.Combine(d, rest)) : [];
    }

    [GeneratedRegex(@"\(PostgreSQL\) (\d+)")]
    private static partial Regex MajorVersion();
}
