using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Repair;

namespace ProtoLedger.Server.Features.Repairs;

/// <summary>Offers, the exact null first where there is one, then the smallest change.</summary>
/// <param name="Offers">Empty where nothing within the limits makes the expectation hold.</param>
internal sealed record RepairsResponse(IReadOnlyList<OfferResponse> Offers)
{
    public static RepairsResponse From(IReadOnlyList<RepairOffer> offers) => new([.. offers.Select(OfferResponse.From)]);
}

/// <summary>One offer.</summary>
/// <param name="Sentence">In words.</param>
/// <param name="Series">Series that is changed.</param>
/// <param name="Settings">Parameters with old and new value.</param>
/// <param name="Probability">That the expectation holds then.</param>
/// <param name="Verdict">Over the tissue draws.</param>
/// <param name="Cost">Every other number that moves, nominal.</param>
/// <param name="Expectations">Every expectation whose verdict changes.</param>
internal sealed record OfferResponse(
    string Sentence, string Series, IReadOnlyList<RepairSetting> Settings, double? Probability, Verdict Verdict,
    IReadOnlyList<MovedResponse> Cost, IReadOnlyList<TransitionResponse> Expectations)
{
    public static OfferResponse From(RepairOffer offer) => new(
        offer.Sentence, offer.Series, offer.Settings, Numbers.Finite(offer.Outcome.Probability), offer.Outcome.Verdict,
        [.. offer.Cost.Moved.Select(m => new MovedResponse(m.Observable.ToString(), Numbers.Finite(m.OldNominal), Numbers.Finite(m.NewNominal)))],
        [.. offer.Cost.Transitions.Where(t => t.Old?.Verdict != t.New?.Verdict).Select(t => new TransitionResponse(t.ExpectationId, t.Transition))]);
}

/// <summary>A number that moves.</summary>
/// <param name="Observable">Which.</param>
/// <param name="Old">Before; null where there was none.</param>
/// <param name="New">After; null where there is none.</param>
internal sealed record MovedResponse(string Observable, double? Old, double? New);

/// <summary>What becomes of an expectation.</summary>
/// <param name="Expectation">Identifier.</param>
/// <param name="Transition">What.</param>
internal sealed record TransitionResponse(string Expectation, Transition Transition);

/// <summary>Whether and how contrasts are kept on another scanner.</summary>
/// <param name="Kept">True when every chosen contrast is within its tolerance.</param>
/// <param name="Sentence">In words.</param>
/// <param name="Settings">Series → settings that differ from the original.</param>
/// <param name="Contrasts">Each contrast: original, plain copy, with the settings.</param>
internal sealed record CarryOverResponse(
    bool Kept, string Sentence, IReadOnlyDictionary<string, IReadOnlyList<RepairSetting>> Settings, IReadOnlyList<CarriedResponse> Contrasts)
{
    public static CarryOverResponse From(CarryOverResult result) => new(
        result.Kept, result.Sentence, result.Settings,
        [.. result.Contrasts.Select(c => new CarriedResponse(
            c.Observable.ToString(), c.Original, Numbers.Finite(c.Copied), Numbers.Finite(c.Carried), c.Tolerance))]);
}

/// <summary>One contrast.</summary>
/// <param name="Observable">Which.</param>
/// <param name="Original">On the scanner of origin, signed.</param>
/// <param name="Copied">With unchanged parameters; null where it cannot be predicted.</param>
/// <param name="Carried">With the settings.</param>
/// <param name="Tolerance">Greatest difference that counts as kept.</param>
internal sealed record CarriedResponse(string Observable, double Original, double? Copied, double? Carried, double Tolerance);

internal static class Numbers
{
    /// <summary>JSON holds no NaN and no infinity.</summary>
    public static double? Finite(double value) => double.IsFinite(value) ? value : null;
}
