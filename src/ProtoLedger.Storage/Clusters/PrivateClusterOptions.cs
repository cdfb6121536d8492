namespace ProtoLedger.Storage.Clusters;

/// <summary>Where a private cluster keeps its data and how careful it is with them.</summary>
/// <param name="DataFolder">Absolute path; made when it is missing, kept between starts.</param>
/// <param name="Durable">False only for throw-away clusters of tests: commits are then not forced to disk.</param>
public sealed record PrivateClusterOptions(string DataFolder, bool Durable = true)
{
    /// <summary>The folder for data of this user, outside any source tree.</summary>
    /// <remarks>
    /// An unprivileged account of the system runs the cluster when the server is started by root. It cannot
    /// enter root's home, so root's cluster lives where the distribution keeps the data of services.
    /// </remarks>
    public static string DefaultDataFolder()
    {
        if (Environment.IsPrivilegedProcess && !OperatingSystem.IsWindows())
            return "/var/lib/protoledger";
        var home = Environment.GetEnvironmentVariable("XDG_DATA_HOME");
        return Path.Combine(
            string.IsNullOrEmpty(home) ? Path.Combine(Environment.GetFolderPath(Environment.SpecialFolder.UserProfile), ".local", "share") : home,
            "protoledger");
    }
}
