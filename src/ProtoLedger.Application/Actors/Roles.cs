namespace ProtoLedger.Application.Actors;

/// <summary>The roles an account can hold.</summary>
public static class Roles
{
    /// <summary>Scans patients, proposes edits, loads versions at the console.</summary>
    public const string Technologist = "technologist";

    /// <summary>Technologist who says "ready to load".</summary>
    public const string LeadTechnologist = "lead-technologist";

    /// <summary>Medical physicist: approves what predictions depend on.</summary>
    public const string Physicist = "physicist";

    /// <summary>Radiologist: accepts a change clinically.</summary>
    public const string Radiologist = "radiologist";

    /// <summary>Accreditation reviewer: reads everything, changes nothing.</summary>
    public const string Reviewer = "reviewer";

    /// <summary>Keeps accounts; no say in physics.</summary>
    public const string Administrator = "administrator";

    /// <summary>All of them.</summary>
    public static IReadOnlyList<string> All { get; } = [Technologist, LeadTechnologist, Physicist, Radiologist, Reviewer, Administrator];
}
