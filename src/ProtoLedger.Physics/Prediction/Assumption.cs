namespace ProtoLedger.Physics.Prediction;

/// <summary>Something that a prediction takes for granted because the series or the setting leaves it open, or because the model leaves it out.</summary>
/// <param name="Code">Stable name for machines, lower camel case, such as <c>steadyState</c>.</param>
/// <param name="Text">One sentence in plain words.</param>
public sealed record Assumption(string Code, string Text);
