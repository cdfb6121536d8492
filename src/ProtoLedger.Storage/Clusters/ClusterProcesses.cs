using System.Diagnostics;
using System.Globalization;

namespace ProtoLedger.Storage.Clusters;

/// <summary>What the system knows of PostgreSQL processes that work in one data folder.</summary>
/// <remarks>
/// PostgreSQL changes into its data folder, so the working folder of a process says whose it is. A lock file
/// alone does not: after a kill its number may belong to another program.
/// </remarks>
internal static class ClusterProcesses
{
    /// <summary>The living postmaster of a folder, or null.</summary>
    public static int? Postmaster(string pgData)
    {
        var file = Path.Combine(pgData, "postmaster.pid");
        if (!File.Exists(file))
            return null;
        var first = File.ReadLines(file).FirstOrDefault();
        return int.TryParse(first, NumberStyles.None, CultureInfo.InvariantCulture, out var id) && WorksIn(id, pgData) ? id : null;
    }

    /// <summary>
    /// Takes away a lock file whose owner is gone. PostgreSQL does so itself, except where the number now belongs
    /// to a foreign process of the same account; that case is the one settled here.
    /// </summary>
    public static void RemoveStaleLock(string pgData)
    {
        if (Postmaster(pgData) is null && Leftovers(pgData).Count == 0)
            File.Delete(Path.Combine(pgData, "postmaster.pid"));
    }

    /// <summary>Waits until children of a killed postmaster have noticed and left; ends those that do not within the time given.</summary>
    public static async Task WaitForLeftoversAsync(string pgData, TimeSpan patience, CancellationToken cancellationToken)
    {
        if (Postmaster(pgData) is not null)
            return;
        var waiting = Stopwatch.StartNew();
        while (Leftovers(pgData) is { Count: > 0 } left)
        {
            if (waiting.Elapsed > patience)
                foreach (var id in left)
                    End(id);
            await Task.Delay(50, cancellationToken);
        }
    }

    /// <summary>Kills every process of a folder at once.</summary>
    public static void KillAll(string pgData)
    {
        foreach (var id in Leftovers(pgData))
            End(id);
    }

    private static List<int> Leftovers(string pgData) =>
        Directory.Exists("/proc")
            ? [.. Directory.EnumerateDirectories("/proc")
                .Select(folder => int.TryParse(Path.GetFileName(folder), NumberStyles.None, CultureInfo.InvariantCulture, out var id) ? id : 0)
                .Where(id => id > 0 && WorksIn(id, pgData))]
            : [];

    private static bool WorksIn(int id, string pgData)
    {
        if (!Directory.Exists("/proc"))
            return Exists(id);
        try
        {
            var folder = new FileInfo($"/proc/{id}/cwd").LinkTarget;
            return folder == pgData && File.ReadAllText($"/proc/{id}/comm").StartsWith("postgres", StringComparison.Ordinal);
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            return false; // the process ended between two looks, or belongs to somebody else
        }
    }

    private static bool Exists(int id)
    {
        try
        {
            using var process = Process.GetProcessById(id);
            return true;
        }
        catch (ArgumentException)
        {
            return false;
        }
    }

    private static void End(int id)
    {
        try
        {
            using var process = Process.GetProcessById(id);
            process.Kill();
        }
        catch (ArgumentException)
        {
            // gone by itself
        }
    }
}
