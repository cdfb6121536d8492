using System.CommandLine;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;
using ProtoLedger.Physics.Qualification;

namespace ProtoLedger.Cli;

/// <summary><c>qualify FILE... [--json]</c>: evaluates reference vectors with the engine of this installation.</summary>
internal static class QualifyCommand
{
    private static readonly JsonSerializerOptions Readable = new() { WriteIndented = true, Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    public static Command Create()
    {
        var files = new Argument<FileInfo[]>("FILE") { Description = "Files of reference vectors.", Arity = ArgumentArity.OneOrMore };
        var json = new Option<bool>("--json") { Description = "Print JSON." };
        var table = new Option<bool>("--table") { Description = "Print one row a family, as a Markdown table." };
        var command = new Command("qualify", "Evaluate reference vectors with the prediction engine and compare with what is expected.") { files, json, table };
        command.SetAction(result => Run(result.GetRequiredValue(files), Form(result.GetValue(json), result.GetValue(table)), result.InvocationConfiguration.Output, result.InvocationConfiguration.Error));
        return command;
    }

    private static int Run(IReadOnlyList<FileInfo> files, OutputForm form, TextWriter output, TextWriter error)
    {
        var reports = new List<(string File, QualificationReport Report)>();
        foreach (var file in files)
        {
            try
            {
                reports.Add((file.Name, Qualifier.Evaluate(QualificationFile.Read(File.ReadAllText(file.FullName)))));
            }
            catch (Exception refused) when (refused is FormatException or IOException or UnauthorizedAccessException)
            {
                error.WriteLine($"{file}: {refused.Message}");
                return ExitCodes.Usage;
            }
        }

        switch (form)
        {
            case OutputForm.Json:
                output.WriteLine(ToJson(reports).ToJsonString(Readable));
                break;
            case OutputForm.Table:
                WriteTable(reports, output);
                break;
            default:
                WriteText(reports, output);
                break;
        }

        return reports.Exists(r => !r.Report.IsBuilt) ? ExitCodes.Usage
            : reports.TrueForAll(r => r.Report.Passed) ? ExitCodes.Good
            : ExitCodes.Bad;
    }

    private enum OutputForm
    {
        Text,
        Json,
        Table,
    }

    private static OutputForm Form(bool json, bool table) => json ? OutputForm.Json : table ? OutputForm.Table : OutputForm.Text;

    private static JsonObject ToJson(List<(string File, QualificationReport Report)> reports) => new()
    {
        ["modelId"] = reports[0].Report.ModelId,
        ["cases"] = new JsonArray([.. reports.SelectMany(r => r.Report.Cases.Select(c => ToJson(r.Report.Family, c)))]),
        ["families"] = new JsonArray([.. reports.Select(r => new JsonObject
        {
            ["file"] = r.File,
            ["family"] = r.Report.Family,
            ["built"] = r.Report.IsBuilt,
            ["cases"] = r.Report.Cases.Count,
            ["passed"] = r.Report.Passed,
        })]),
    };

    private static JsonObject ToJson(string family, QualificationCaseResult testCase)
    {
        var computed = new JsonObject();
        var verdicts = new JsonObject();
        foreach (var quantity in testCase.Quantities)
        {
            computed[quantity.Name] = quantity.IsList
                ? new JsonArray([.. quantity.Computed.Select(Number)])
                : Number(quantity.Computed[0]);
            if (quantity.Verdict is not QuantityVerdict.Asked)
                verdicts[quantity.Name] = new JsonObject
                {
                    ["deviation"] = quantity.Deviation is { } d ? Number(d) : null,
                    ["tolerance"] = quantity.Tolerance,
                    ["verdict"] = Word(quantity.Verdict),
                };
        }

        var json = new JsonObject { ["id"] = testCase.Id, ["family"] = family, ["computed"] = computed };
        if (verdicts.Count > 0)
            json["verdicts"] = verdicts;
        if (testCase.Error is not null)
            json["error"] = testCase.Error;
        return json;
    }

    private static void WriteText(List<(string File, QualificationReport Report)> reports, TextWriter output)
    {
        output.WriteLine($"model {reports[0].Report.ModelId}");
        foreach (var (file, report) in reports)
        {
            output.WriteLine();
            output.WriteLine($"{report.Family} ({file})");
            if (!report.IsBuilt)
            {
                output.WriteLine("  this family is not built");
                continue;
            }

            foreach (var testCase in report.Cases)
                WriteText(testCase, output);
            var judged = report.Cases.SelectMany(c => c.Quantities).Where(q => q.Verdict is not QuantityVerdict.Asked).ToList();
            var worst = judged.Select(q => q.Deviation ?? 0).DefaultIfEmpty(0).Max();
            output.WriteLine(
                $"  {report.Cases.Count} cases, {judged.Count(q => q.Verdict is QuantityVerdict.Within)} quantities within tolerance, {judged.Count(q => q.Verdict is QuantityVerdict.Outside)} outside, {report.Cases.Count(c => c.Error is not null)} cases not computed, largest deviation {Text(worst)}");
        }
    }

    private static void WriteTable(List<(string File, QualificationReport Report)> reports, TextWriter output)
    {
        output.WriteLine("| family | cases | numbers | largest deviation | largest share of its tolerance | outside |");
        output.WriteLine("| --- | --- | --- | --- | --- | --- |");
        foreach (var report in reports.Select(r => r.Report))
        {
            var judged = report.Cases.SelectMany(c => c.Quantities).Where(q => q.Verdict is not QuantityVerdict.Asked).ToList();
            var outside = judged.Count(q => q.Verdict is QuantityVerdict.Outside) + report.Cases.Count(c => c.Error is not null);
            var deviation = judged.Select(q => q.Deviation ?? 0).DefaultIfEmpty(0).Max();
            var share = judged.Select(q => q.Deviation / q.Tolerance ?? 0).DefaultIfEmpty(0).Max();
            output.WriteLine(string.Create(
                System.Globalization.CultureInfo.InvariantCulture,
                $"| {report.Family} | {report.Cases.Count} | {judged.Sum(q => q.Computed.Count)} | {deviation:0.0e+0} | {share:0.0 %} | {(report.IsBuilt ? outside : "not built")} |"));
        }
    }

    private static void WriteText(QualificationCaseResult testCase, TextWriter output)
    {
        output.WriteLine($"  {testCase.Id}");
        if (testCase.Error is not null)
            output.WriteLine($"    not computed: {testCase.Error}");
        foreach (var quantity in testCase.Quantities)
        {
            var verdict = quantity.Verdict is QuantityVerdict.Asked ? "" : $"   {Word(quantity.Verdict)}: deviation {Text(quantity.Deviation ?? 0)}, tolerance {Text(quantity.Tolerance ?? double.NaN)}";
            output.WriteLine($"    {quantity.Name} = {string.Join(", ", quantity.Computed.Select(Text))}{verdict}");
        }
    }

    private static string Word(QuantityVerdict verdict) => verdict is QuantityVerdict.Within ? "within" : "outside";

    private static JsonNode? Number(double value) => double.IsFinite(value) ? JsonValue.Create(value) : null;

    private static string Text(double value) => value.ToString("R", System.Globalization.CultureInfo.InvariantCulture);
}
