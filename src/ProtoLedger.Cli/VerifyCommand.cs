using System.CommandLine;
using System.Text.Encodings.Web;
using System.Text.Json;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Bundles;

namespace ProtoLedger.Cli;

/// <summary><c>verify FILE --trust DIR [--checkpoint FILE] [--json]</c>: checks a bundle without a server and without a network.</summary>
internal static class VerifyCommand
{
    private static readonly JsonSerializerOptions Readable = new(JsonSerializerDefaults.Web) { WriteIndented = true, Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    public static Command Create()
    {
        var file = new Argument<FileInfo>("FILE") { Description = "The bundle." };
        var trust = new Option<DirectoryInfo?>("--trust") { Description = "Folder with what you trust from outside: *.pem authorities, *.vkey checkpoint keys." };
        var checkpoint = new Option<FileInfo?>("--checkpoint") { Description = "A checkpoint that you kept from earlier." };
        var json = new Option<bool>("--json") { Description = "Print JSON." };
        var command = new Command("verify", "Verify a bundle offline. Exit code: 0 good, 1 bad, 2 wrong usage, 3 consistent but origin unknown.") { file, trust, checkpoint, json };
        command.SetAction(result => Run(
            result.GetRequiredValue(file), result.GetValue(trust), result.GetValue(checkpoint), result.GetValue(json),
            result.InvocationConfiguration.Output, result.InvocationConfiguration.Error));
        return command;
    }

    private static int Run(FileInfo file, DirectoryInfo? trustFolder, FileInfo? checkpoint, bool asJson, TextWriter output, TextWriter error)
    {
        try
        {
            var trust = trustFolder is null
                ? BundleTrust.None
                : BundleTrust.Parse(trustFolder.EnumerateFiles().Select(f => (f.Name, File.ReadAllBytes(f.FullName)))) switch
                {
                    Parsed<BundleTrust>.Bad(var reason) => throw new FormatException(reason),
                    var read => read.Require(),
                };
            using var bundle = file.OpenRead();
            var report = BundleVerifier.Verify(bundle, trust, checkpoint is null ? null : File.ReadAllBytes(checkpoint.FullName));
            if (asJson)
                output.WriteLine(ToJson(report));
            else
                foreach (var line in report.Lines())
                    output.WriteLine(line);
            return report.ExitCode;
        }
        catch (Exception refused) when (refused is FormatException or IOException or UnauthorizedAccessException)
        {
            error.WriteLine(refused.Message);
            return ExitCodes.Usage;
        }
    }

    private static string ToJson(BundleReport report) => JsonSerializer.Serialize(
        new
        {
            outcome = JsonNamingPolicy.CamelCase.ConvertName(report.Outcome.ToString()),
            exitCode = report.ExitCode,
            faults = report.Faults.Select(f => new { part = JsonNamingPolicy.CamelCase.ConvertName(f.Part.ToString()), entry = f.Entry, detail = f.Detail }),
            holds = report.Holds,
            unknown = report.Unknown,
            signatures = report.Signatures.OrderBy(s => s.Key).Select(s => new { leaf = s.Key, verdict = s.Value.Words }),
        },
        Readable);
}
