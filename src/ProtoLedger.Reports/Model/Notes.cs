namespace ProtoLedger.Reports.Model;

/// <summary>Something that this prediction does not hold, because of what the edit touches.</summary>
/// <param name="Effect">Name of the effect, such as "magnetisation transfer".</param>
/// <param name="Text">What follows for this edit, in one or two sentences.</param>
/// <param name="Because">Parameters that make it matter.</param>
public sealed record OmissionNote(string Effect, string Text, IReadOnlyList<string> Because);

/// <summary>Something to do next.</summary>
/// <param name="What">The task.</param>
/// <param name="Where">Scanner, place or page.</param>
/// <param name="ByWhom">Role or name.</param>
/// <param name="When">Before or after what, such as "before approval".</param>
public sealed record ReportStep(string What, string Where, string ByWhom, string When);

/// <summary>A value that the documents leave open, or one that rests on weak evidence.</summary>
/// <param name="Name">What is assumed.</param>
/// <param name="Value">With unit.</param>
/// <param name="Source">Where it comes from.</param>
/// <param name="Weak">True where the evidence is recalled or estimated.</param>
public sealed record Assumption(string Name, string Value, string Source, bool Weak);
