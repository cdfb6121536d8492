using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <summary>What must stand on everything that shows a prediction.</summary>
internal static class Cautions
{
    /// <summary>The one line that fits anywhere.</summary>
    public const string Short =
        "Predictions from models and published tissue values: no measurement, no diagnosis, no safety clearance.";

    /// <summary>The standing cautions, said for the edit at hand.</summary>
    public static IEnumerable<string> Of(ChangeReport report, ReportWords words)
    {
        yield return "Everything above is computed from models and published tissue values. It is no measurement and no diagnosis.";
        var changed = report.Scanners.Select(s => words.Scanner(s.ScannerId)).ToList();
        yield return changed.Count == 0
            ? "Confirm on a phantom or volunteer before clinical use; the record of that can be attached to the approval."
            : $"Confirm on a phantom or volunteer on {ReportWords.Join(changed)} before clinical use; the record of that can be attached to the approval.";
        yield return PowerChange(report) is { } power
            ? $"Relative RF power is predicted to go from 1 to {power}. It is no safety limit, and nothing here clears an implant: the scanner's own RF monitoring, the device's conditions, local rules and the licensed medical physicist decide."
            : "Relative RF power is no safety limit, and nothing here clears an implant: the scanner's own RF monitoring, the device's conditions, local rules and the licensed medical physicist decide.";
        var weak = report.Assumptions.Count(a => a.Weak);
        if (weak > 0)
            yield return $"{ReportWords.Count(weak, "value rests", "values rest")} on weak evidence (recalled or estimated) and {(weak == 1 ? "is" : "are")} marked above.";
        if (report.Appearances.Count > 0)
            yield return "The pictures are drawn from digital phantoms with predicted signals. They show relative brightness, not anatomy, artefacts or lesions of any patient.";
        if (report.Run.FailedShards > 0)
            yield return $"{ReportWords.Count(report.Run.FailedShards, "part", "parts")} of the run could not be computed; what is missing may matter.";
        foreach (var caution in report.Cautions)
            yield return UserText.Literal(ReportWords.Sentence(caution));
    }

    private static string? PowerChange(ChangeReport report)
    {
        var largest = report.Effects
            .Where(e => e is { Observable: "relativeRfPower", Before.Nominal: > 0, After: not null })
            .Select(e => e.After!.Nominal / e.Before!.Nominal)
            .DefaultIfEmpty(1)
            .Max();
        return largest > 1.005 ? Numbers.Plain(largest, 1) : null;
    }
}
