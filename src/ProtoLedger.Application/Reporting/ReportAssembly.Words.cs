using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Application.Reporting;

/// <summary>Words and numbers.</summary>
internal sealed partial class ReportAssembly
{
    private static string Unit(string observable) => ObservableWords.Unit(observable);

    private static double? Finite(double value) => double.IsFinite(value) ? value : null;

    private static double? At(EvaluationResult result, ObservableKey key) => result.IndexOf(key) is >= 0 and var i ? Finite(result.Nominal[i]) : null;

    private static string? Words(AssessedProtocol one, string? tissue) => tissue is null
        ? null
        : PlainWords.Tissue(tissue, one.Edit.Document.BodyRegion, one.Edit.Scanners[0].After.Catalogue.Document);

    private string? Words(string? tissue) => assessed.Count == 0 ? tissue : Words(assessed[0], tissue);

    /// <summary>Title of a series; with the protocol's where the report speaks of several.</summary>
    private string Title(AssessedProtocol one, string series)
    {
        var title = one.Edit.Document.Series.FirstOrDefault(candidate => candidate.Id == series)?.Title
            ?? one.Edit.Scanners[0].Before.Protocol.Document.Series.FirstOrDefault(candidate => candidate.Id == series)?.Title
            ?? series;
        return Several ? $"{one.Edit.Document.Title}: {title}" : title;
    }

    private static string Condition(EditOnScanner edit, string name) =>
        name == ObservableKey.NominalCondition
            ? "nominal field"
            : edit.After.Conditions.Document.Conditions.FirstOrDefault(condition => condition.Name == name)?.Title ?? name;

    private static EditOnScanner Edit(AssessedProtocol one, string scanner) =>
        one.Edit.Scanners.First(edit => edit.After.Scanner.Document.Id == scanner);

    private static ProtocolSeries? SeriesOf(EvaluationInput input, string id) => input.Protocol.Document.Series.FirstOrDefault(series => series.Id == id);
}
