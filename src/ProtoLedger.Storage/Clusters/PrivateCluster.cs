using System.Security.Cryptography;
using System.Text;
using Npgsql;

namespace ProtoLedger.Storage.Clusters;

/// <summary>
/// A PostgreSQL cluster of this program alone, reached through a Unix socket that only its own account (and root)
/// can open, so that it neither takes a port nor knows a password.
/// </summary>
/// <remarks>
/// Whoever holds the lock on the file <c>owner</c> in the data folder stops the cluster at the end. The lock goes with
/// the process, so after a kill the next start takes over a cluster that still runs; a second program on the same
/// folder finds the lock held and only joins.
/// </remarks>
public sealed class PrivateCluster : IAsyncDisposable
{
    private const string Superuser = "protoledger";
    private const string DatabaseExists = "SELECT EXISTS (SELECT FROM pg_database WHERE datname = @name)";
    private const string CreateDatabase = "CREATE DATABASE ";
    private const int LongestSocketFolder = 80;
    private readonly PostgresBinaries binaries;
    private readonly ClusterAccount account;
    private readonly string pgData;
    private FileStream? ownership;

    private PrivateCluster(PostgresBinaries binaries, ClusterAccount account, string pgData, string socketFolder, FileStream? ownership)
    {
        this.binaries = binaries;
        this.account = account;
        this.pgData = pgData;
        this.ownership = ownership;
        SocketFolder = socketFolder;
    }

    /// <summary>Folder of the Unix socket: the host name for clients.</summary>
    public string SocketFolder { get; }

    /// <summary>Process id of the postmaster, or null when it does not run.</summary>
    public int? ProcessId => ClusterProcesses.Postmaster(pgData);

    /// <summary>True when this object stops the cluster as it is disposed.</summary>
    public bool IsOwner => ownership is not null;

    /// <summary>How to reach a database of the cluster as its owner.</summary>
    /// <param name="database">Name of the database.</param>
    public string ConnectionString(string database = "protoledger") => new NpgsqlConnectionStringBuilder
    {
        Host = SocketFolder,
        Username = Superuser,
        Database = database,
        ApplicationName = "protoledger",
    }.ConnectionString;

    /// <summary>Starts the cluster of a data folder, or joins or takes over the one that runs there.</summary>
    /// <param name="options">Where and how.</param>
    /// <param name="cancellationToken">Gives up.</param>
    /// <exception cref="PrivateClusterException">No PostgreSQL, no fit account, a folder of another version, a cluster that does not start.</exception>
    public static async Task<PrivateCluster> StartAsync(PrivateClusterOptions options, CancellationToken cancellationToken)
    {
        var folder = Path.GetFullPath(options.DataFolder);
        Directory.CreateDirectory(folder);
        var account = ClusterAccount.Choose();
        await LetPassAsync(account, folder, cancellationToken);
        var ownership = TakeOwnership(Path.Combine(folder, "owner"));
        try
        {
            var binaries = Choose(await PostgresBinaries.FindAsync(cancellationToken), folder);
            var pgData = Path.Combine(folder, FolderName(binaries.Major));
            var cluster = new PrivateCluster(binaries, account, pgData, SocketFolderOf(folder), ownership);
            if (ownership is null)
                await cluster.JoinAsync(cancellationToken);
            else
                await cluster.OpenAsync(options.Durable, cancellationToken);
            return cluster;
        }
        catch
        {
            ownership?.Dispose();
            throw;
        }
    }

    /// <summary>Kills every PostgreSQL process of a data folder as a power cut would; for tests of recovery.</summary>
    /// <param name="dataFolder">The folder.</param>
    public static void KillEverything(string dataFolder)
    {
        foreach (var pgData in Directory.EnumerateDirectories(Path.GetFullPath(dataFolder), "postgresql-*"))
            ClusterProcesses.KillAll(pgData);
    }

    /// <summary>Makes a database when it is missing.</summary>
    /// <param name="database">Name; letters, digits and underscores.</param>
    /// <param name="cancellationToken">Gives up.</param>
    public async Task EnsureDatabaseAsync(string database, CancellationToken cancellationToken)
    {
        await using var source = NpgsqlDataSource.Create(ConnectionString("postgres"));
        await using var exists = source.CreateCommand(DatabaseExists);
        exists.Parameters.AddWithValue("name", database);
        if (await exists.ExecuteScalarAsync(cancellationToken) is true)
            return;
        using var names = new NpgsqlCommandBuilder();
        var quoted = names.QuoteIdentifier(database);
        await using var create = source.CreateCommand(CreateDatabase + quoted);
        try
        {
            await create.ExecuteNonQueryAsync(cancellationToken);
        }
        catch (PostgresException error) when (error.SqlState is PostgresErrorCodes.DuplicateDatabase or PostgresErrorCodes.UniqueViolation)
        {
            // another process was quicker
        }
    }

    /// <summary>Starts the postmaster again after it was lost; does nothing where it runs.</summary>
    /// <param name="cancellationToken">Gives up.</param>
    public async Task EnsureRunningAsync(CancellationToken cancellationToken)
    {
        if (IsOwner && ProcessId is null)
            await LaunchAsync(cancellationToken);
    }

    /// <summary>Stops the cluster when this object owns it; clients are disconnected, committed work is kept.</summary>
    public async ValueTask DisposeAsync()
    {
        if (ownership is null)
            return;
        if (ProcessId is not null)
            await account.RunAsync(binaries.PgCtl, ["stop", "-D", pgData, "-m", "fast", "-w", "-t", "60", "-s"], CancellationToken.None);
        await ownership.DisposeAsync();
        ownership = null;
    }

    private static string FolderName(int major) => $"postgresql-{major}";

    private static PostgresBinaries Choose(IReadOnlyList<PostgresBinaries> found, string folder)
    {
        var existing = Directory.EnumerateDirectories(folder, "postgresql-*").Select(Path.GetFileName).ToList();
        if (found.Count == 0)
            throw new PrivateClusterException(
                "No PostgreSQL found on PATH or in the distribution's folders: install the package postgresql (Debian, Ubuntu: apt-get install postgresql; Fedora: dnf install postgresql-server; Alpine: apk add postgresql), or set ConnectionStrings__ProtoLedger.");
        if (existing.Count == 0)
            return found[0];
        return found.FirstOrDefault(b => existing.Contains(FolderName(b.Major)))
            ?? throw new PrivateClusterException(
                $"The data in {folder} belong to {string.Join(", ", existing)} and only PostgreSQL {string.Join(", ", found.Select(b => b.Major))} is installed: install that version, or choose another ProtoLedger__DataFolder.");
    }

    private static FileStream? TakeOwnership(string file)
    {
        try
        {
            return new FileStream(file, FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None);
        }
        catch (IOException)
        {
            return null; // held by another process
        }
    }

    private static string SocketFolderOf(string folder)
    {
        var inside = Path.Combine(folder, "socket");
        return inside.Length <= LongestSocketFolder
            ? inside
            : Path.Combine(Path.GetTempPath(), "protoledger-" + Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(folder)))[..12]);
    }

    /// <summary>Lets the account enter the data folder, and says so where a folder above bars the way.</summary>
    private static async Task LetPassAsync(ClusterAccount account, string folder, CancellationToken cancellationToken)
    {
        if (account.Name is null || OperatingSystem.IsWindows())
            return;
        File.SetUnixFileMode(folder, File.GetUnixFileMode(folder) | UnixFileMode.GroupExecute | UnixFileMode.OtherExecute);
        var entered = await account.RunAsync("/usr/bin/test", ["-x", folder], cancellationToken);
        if (entered.ExitCode != 0)
            throw new PrivateClusterException(
                $"The account {account.Name}, which runs PostgreSQL because root may not, cannot enter {folder}: choose a ProtoLedger__DataFolder outside root's home, for example {PrivateClusterOptions.DefaultDataFolder()}.");
    }

    private async Task OpenAsync(bool durable, CancellationToken cancellationToken)
    {
        if (ProcessId is not null && await AnswersAsync(cancellationToken))
            return;
        await account.OwnAsync(SocketFolder, cancellationToken);
        if (!File.Exists(Path.Combine(pgData, "PG_VERSION")))
            await InitialiseAsync(durable, cancellationToken);
        await LaunchAsync(cancellationToken);
    }

    private async Task JoinAsync(CancellationToken cancellationToken)
    {
        for (var attempt = 0; attempt < 600; attempt++)
        {
            if (await AnswersAsync(cancellationToken))
                return;
            await Task.Delay(100, cancellationToken);
        }

        throw new PrivateClusterException($"Another process holds {pgData}, but its PostgreSQL does not answer within 60 s.");
    }

    private async Task InitialiseAsync(bool durable, CancellationToken cancellationToken)
    {
        // A first start that was cut leaves a folder without PG_VERSION or half filled; it holds nothing yet.
        var fresh = pgData + ".new";
        if (Directory.Exists(fresh))
            Directory.Delete(fresh, recursive: true);
        await account.OwnAsync(fresh, cancellationToken);
        var made = await account.RunAsync(
            binaries.InitDb,
            ["-D", fresh, "-U", Superuser, "--auth=trust", "--encoding=UTF8", "--locale=C", "--data-checksums", .. durable ? Array.Empty<string>() : ["--no-sync"]],
            cancellationToken);
        if (made.ExitCode != 0)
            throw new PrivateClusterException("initdb failed: " + OneLine(made.Output));
        var settings = new StringBuilder("\nlisten_addresses = ''\nunix_socket_permissions = 0700\nmax_connections = 200\nlog_timezone = 'UTC'\ntimezone = 'UTC'\n");
        if (!durable)
            settings.Append("fsync = off\nsynchronous_commit = off\nfull_page_writes = off\n");
        await File.AppendAllTextAsync(Path.Combine(fresh, "postgresql.conf"), settings.ToString(), cancellationToken);
        Directory.Move(fresh, pgData);
    }

    private async Task LaunchAsync(CancellationToken cancellationToken)
    {
        await ClusterProcesses.WaitForLeftoversAsync(pgData, TimeSpan.FromSeconds(10), cancellationToken);
        ClusterProcesses.RemoveStaleLock(pgData);
        var options = "-c unix_socket_directories=" + ClusterAccount.ShellQuote(SocketFolder);
        Command started = new(1, "");
        for (var attempt = 0; attempt < 20; attempt++)
        {
            started = await account.RunAsync(
                binaries.PgCtl, ["start", "-D", pgData, "-l", Path.Combine(pgData, "server.log"), "-o", options, "-w", "-t", "120", "-s"], cancellationToken);
            if (started.ExitCode == 0)
                return;
            await Task.Delay(250, cancellationToken); // shared memory of a killed predecessor may still be attached
        }

        throw new PrivateClusterException($"PostgreSQL does not start, see {Path.Combine(pgData, "server.log")}: {OneLine(started.Output)}");
    }

    private async Task<bool> AnswersAsync(CancellationToken cancellationToken)
    {
        try
        {
            await using var connection = new NpgsqlConnection(ConnectionString("postgres") + ";Pooling=false;Timeout=5");
            await connection.OpenAsync(cancellationToken);
            return true;
        }
        catch (NpgsqlException)
        {
            return false;
        }
    }

    private static string OneLine(string text) => string.Join(' ', text.Split('\n', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries));
}
