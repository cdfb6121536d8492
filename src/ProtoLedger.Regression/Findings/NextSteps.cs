using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Findings;

/// <summary>What must be done next, where, by whom.</summary>
internal static class NextSteps
{
    internal static IReadOnlyList<NextStep> For(IReadOnlyList<ScannerAssessment> scanners, IReadOnlyList<ChangedParameter> changes, ProtocolDocument protocol)
    {
        var steps = new List<NextStep>();
        foreach (var scanner in scanners)
        {
            var broken = scanner.Findings.Where(f => f.Transition is Transition.NewlyFails or Transition.NewlyUncertain && f.Direction == FindingDirection.Worse).ToArray();
            if (broken.Length > 0)
                steps.Add(new($"Decline, or repair what breaks: {string.Join(", ", broken.Select(f => $"\u201C{f.ExpectationTitle}\u201D"))}.", scanner.ScannerId, "physicist", "before approval"));
        }

        var affected = scanners.Where(s => s.Difference.Moved.Count > 0).ToArray();
        if (affected.Length == 0)
            return steps;
        var worst = affected[0];
        var series = string.Join(", ", worst.Findings.Select(f => f.SeriesTitle).Distinct().DefaultIfEmpty(protocol.Title));
        steps.Add(new($"Confirm on a phantom or a volunteer: {series}.", worst.ScannerId, "physicist", "before clinical use"));
        steps.Add(new("Judge the changed contrast in sample images.", worst.ScannerId, "radiologist", "before clinical use"));
        if (changes.Any(c => c.Document is DocumentKind.Protocol))
        {
            foreach (var scanner in affected)
                steps.Add(new("Enter the new values at the console, have a second person check them, and read scan time, SAR and minimum echo time again.", scanner.ScannerId, "technologist", "after approval"));
        }

        if (changes.Any(c => c.Document is DocumentKind.Catalogue or DocumentKind.Conditions or DocumentKind.Expectations or DocumentKind.Scanner))
            steps.Add(new("Look through the other stored versions whose prediction moved.", "every scanner", "physicist", "before approval"));
        return steps;
    }
}
