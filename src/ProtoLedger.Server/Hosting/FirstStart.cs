using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Importing;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Site;

namespace ProtoLedger.Server.Hosting;

/// <summary>What happens between an open database and the first request: keys, documents, people, first regression run.</summary>
internal sealed class FirstStart(PrepareSite site, ImportStore import, DemoPeople demo, ReadRuns runs, ServerOptions options, DatabaseAccess database)
{
    private const int RunsLookedAt = 200;
    private static readonly TimeSpan Interval = TimeSpan.FromMilliseconds(100);

    private string Store => options.Store ?? Path.Combine(AppContext.BaseDirectory, "protocol-store");

    /// <summary>Fills what is empty.</summary>
    /// <returns>Lines that say how to sign in.</returns>
    /// <exception cref="StartupException">The store has faults, or the sealing key is another's.</exception>
    public async Task<IReadOnlyList<string>> FillAsync(CancellationToken cancellationToken)
    {
        try
        {
            await site.RunAsync(cancellationToken);
        }
        catch (InvalidOperationException wrongKey)
        {
            throw new StartupException(wrongKey.Message);
        }

        var imported = await import.RunAsync(Store, cancellationToken);
        if (imported.Succeeded)
            await Console.Out.WriteLineAsync($"imported {imported.Value.Versions} versions and {imported.Value.Proposals} closed proposals from {Store}");
        else if (imported.Refusal is not Conflict)
            throw new StartupException(Describe(imported.Refusal));
        if (!options.ServesWeb)
            return [];
        return options.ShowsDemo(database)
            ? await demo.PrepareAsync(Store, cancellationToken)
            : ["people sign in with accounts of this site; the first administrator is made with: protoledger add-administrator NAME"];
    }

    /// <summary>Waits until no run of an import is left to do.</summary>
    public async Task FinishRunsAsync(CancellationToken cancellationToken)
    {
        while (true)
        {
            var list = await runs.ListAsync(Caller.System, null, RunsLookedAt, cancellationToken);
            if (!list.Succeeded || list.Value.All(run => run.Cause != RunCause.Import || run.FinishedAt is not null))
                return;
            await Task.Delay(Interval, cancellationToken);
        }
    }

    private static string Describe(Refusal refusal) => refusal is Invalid invalid
        ? string.Join('\n', [refusal.Detail, .. invalid.Errors.Select(e => $"  {e.Pointer}: {e.Detail} Value: {e.Value}. Limit: {e.Limit}.")])
        : refusal.Detail;
}
