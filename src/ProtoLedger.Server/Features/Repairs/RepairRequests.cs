using System.Globalization;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Repairs;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Repair;

namespace ProtoLedger.Server.Features.Repairs;

/// <summary>An expectation to repair.</summary>
/// <param name="Scanner">Scanner identifier.</param>
/// <param name="Expectation">Identifier in the expectations document.</param>
/// <param name="ChangeRequest">Proposal under review; leave out for a stored version.</param>
/// <param name="Protocol">Protocol of a stored version.</param>
/// <param name="Version">Its number; the newest where it is left out.</param>
/// <param name="Parameters">Parameters that may change; the usual ones where they are left out.</param>
internal sealed record RepairRequest(
    string Scanner, string Expectation, long? ChangeRequest = null, string? Protocol = null, int? Version = null, IReadOnlyList<ParameterLimits>? Parameters = null)
{
    public Outcome<RepairQuestion> ToQuestion()
    {
        var errors = new List<FieldError>();
        StateRequests.Check(ChangeRequest, Protocol, errors);
        foreach (var (limits, i) in (Parameters ?? []).Select((p, i) => (p, i)))
        {
            if (!(limits.Step > 0) || !(limits.Low <= limits.High))
            {
                errors.Add(new FieldError(
                    string.Create(CultureInfo.InvariantCulture, $"/parameters/{i}"), string.Create(CultureInfo.InvariantCulture, $"{limits.Low} to {limits.High} by {limits.Step}"),
                    "low ≤ high, step > 0", "This range holds no value."));
            }
        }

        return errors.Count > 0
            ? new Invalid($"{errors.Count} field(s) cannot be used.", errors)
            : new RepairQuestion(
                new ProtocolChoice(ChangeRequest, Protocol, Version), Scanner, Expectation, Parameters?.Select(p => new RepairParameter(p.Pointer, p.Low, p.High, p.Step)).ToArray());
    }
}

/// <summary>Limits of one parameter.</summary>
/// <param name="Pointer">JSON pointer below the series, such as /readout/RepetitionTime.</param>
/// <param name="Low">Lowest value.</param>
/// <param name="High">Highest value.</param>
/// <param name="Step">Step of the console.</param>
internal sealed record ParameterLimits(string Pointer, double Low, double High, double Step);

/// <summary>A protocol to copy to another scanner.</summary>
/// <param name="FromScanner">Scanner on which the contrasts are as wanted.</param>
/// <param name="ToScanner">Scanner to which it is copied.</param>
/// <param name="Contrasts">Observables such as series/contrastRatio(grey-matter,white-matter)@nominal.</param>
/// <param name="ChangeRequest">Proposal under review; leave out for a stored version.</param>
/// <param name="Protocol">Protocol of a stored version.</param>
/// <param name="Version">Its number; the newest where it is left out.</param>
/// <param name="Tolerance">Greatest difference that counts as kept.</param>
internal sealed record CarryOverRequest(
    string FromScanner, string ToScanner, IReadOnlyList<string> Contrasts, long? ChangeRequest = null, string? Protocol = null, int? Version = null, double? Tolerance = null)
{
    private const int MostContrasts = 16;

    public Outcome<CarryOverQuestion> ToQuestion()
    {
        var errors = new List<FieldError>();
        StateRequests.Check(ChangeRequest, Protocol, errors);
        if (Contrasts.Count is 0 or > MostContrasts)
            errors.Add(new FieldError("/contrasts", Contrasts.Count.ToString(CultureInfo.InvariantCulture), $"1 to {MostContrasts}", "Name the contrasts that must be kept."));
        if (Tolerance is not null and not > 0)
            errors.Add(new FieldError("/tolerance", Tolerance.Value.ToString(CultureInfo.InvariantCulture), "> 0", "Nothing is kept exactly."));
        var keys = new List<ObservableKey>();
        foreach (var (text, i) in Contrasts.Select((c, i) => (c, i)))
        {
            try
            {
                keys.Add(ObservableKey.Parse(text));
            }
            catch (FormatException fault)
            {
                errors.Add(new FieldError(string.Create(CultureInfo.InvariantCulture, $"/contrasts/{i}"), text, "series/observable(tissue,reference)@nominal", fault.Message));
            }
        }

        return errors.Count > 0
            ? new Invalid($"{errors.Count} field(s) cannot be used.", errors)
            : new CarryOverQuestion(new ProtocolChoice(ChangeRequest, Protocol, Version), FromScanner, ToScanner, keys, Tolerance);
    }
}

/// <summary>What both requests have in common.</summary>
internal static class StateRequests
{
    public static void Check(long? changeRequest, string? protocol, List<FieldError> errors)
    {
        if (changeRequest is null == protocol is null)
            errors.Add(new FieldError("/protocol", protocol, "either changeRequest or protocol", "Name a proposal under review or a stored protocol."));
    }
}
