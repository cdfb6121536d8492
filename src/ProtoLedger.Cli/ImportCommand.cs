using System.CommandLine;
using ProtoLedger.Application.Importing;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Cli;

/// <summary><c>import DIR</c>: takes the history of a protocol store into an empty database.</summary>
internal static class ImportCommand
{
    public static Command Create()
    {
        var folder = new Argument<DirectoryInfo>("DIR") { Description = "Folder with history.yaml and the documents." };
        var command = new Command("import", "Take a protocol store into an empty database, all or nothing.") { folder };
        command.SetAction((result, cancellationToken) => Installation.RunAsync(
            installation => RunAsync(installation, result.GetRequiredValue(folder), result.InvocationConfiguration.Output, result.InvocationConfiguration.Error, cancellationToken),
            result.InvocationConfiguration.Error,
            cancellationToken));
        return command;
    }

    private static async Task<int> RunAsync(Installation installation, DirectoryInfo folder, TextWriter output, TextWriter error, CancellationToken cancellationToken)
    {
        var outcome = await installation.Get<ImportStore>().RunAsync(folder.FullName, cancellationToken);
        if (outcome.Succeeded)
        {
            await output.WriteLineAsync($"imported {outcome.Value.Versions} versions and {outcome.Value.Proposals} closed proposals; run {outcome.Value.RunId} is queued");
            return ExitCodes.Good;
        }

        await error.WriteLineAsync(outcome.Refusal.Detail);
        foreach (var fault in outcome.Refusal is Invalid invalid ? invalid.Errors : [])
            await error.WriteLineAsync($"  {fault.Pointer}: {fault.Detail} Value: {fault.Value}. Limit: {fault.Limit}.");
        return ExitCodes.Bad;
    }
}
