namespace ProtoLedger.Storage.Clusters;

/// <summary>The account of the system under which PostgreSQL runs, since it refuses to run as root.</summary>
/// <param name="Name">Account name; null when the server itself is unprivileged and its own account serves.</param>
internal sealed record ClusterAccount(string? Name)
{
    /// <summary>The account to use here.</summary>
    public static ClusterAccount Choose()
    {
        if (!Environment.IsPrivilegedProcess || OperatingSystem.IsWindows())
            return new ClusterAccount((string?)null);
        var accounts = File.ReadLines("/etc/passwd").Select(line => line.Split(':')[0]).ToHashSet();
        return accounts.Contains("postgres") ? new ClusterAccount("postgres")
            : accounts.Contains("nobody") ? new ClusterAccount("nobody")
            : throw new PrivateClusterException(
                "PostgreSQL refuses to run as root and there is no account postgres or nobody: start the server as another user, or set ConnectionStrings__ProtoLedger.");
    }

    /// <summary>Runs a program as this account.</summary>
    public Task<Command> RunAsync(string program, IEnumerable<string> arguments, CancellationToken cancellationToken)
    {
        if (Name is null)
            return Command.RunAsync(program, arguments, cancellationToken);
        if (OnPath("setpriv") is { } setpriv)
            return Command.RunAsync(setpriv, ["--reuid", Name, "--regid", Name == "nobody" ? GroupOfNobody() : Name, "--clear-groups", "--", program, .. arguments], cancellationToken);
        if (OnPath("runuser") is { } runuser)
            return Command.RunAsync(runuser, ["-u", Name, "--", program, .. arguments], cancellationToken);
        var line = string.Join(' ', new[] { program }.Concat(arguments).Select(ShellQuote));
        return Command.RunAsync("su", [Name, "-s", "/bin/sh", "-c", line], cancellationToken);
    }

    /// <summary>Makes a folder that only this account reads.</summary>
    public async Task OwnAsync(string folder, CancellationToken cancellationToken)
    {
        Directory.CreateDirectory(folder);
        if (!OperatingSystem.IsWindows())
            File.SetUnixFileMode(folder, UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute);
        if (Name is not null && await Command.RunAsync("chown", [Name, folder], cancellationToken) is { ExitCode: not 0 } failed)
            throw new PrivateClusterException($"{folder} cannot be given to the account {Name}: {failed.Output.Trim()}");
    }

    /// <summary>Quotes a word for a POSIX shell.</summary>
    public static string ShellQuote(string word) => "'" + word.Replace("'", @"'\''", StringComparison.Ordinal) + "'";

    private static string GroupOfNobody() =>
        File.ReadLines("/etc/group").Any(line => line.StartsWith("nogroup:", StringComparison.Ordinal)) ? "nogroup" : "nobody";

    private static string? OnPath(string program) =>
        (Environment.GetEnvironmentVariable("PATH") ?? "").Split(Path.PathSeparator, StringSplitOptions.RemoveEmptyEntries)
            .Concat(["/usr/bin", "/bin", "/usr/sbin", "/sbin"])
            .Select(folder => Path.Combine(folder, program))
            .FirstOrDefault(File.Exists);
}
