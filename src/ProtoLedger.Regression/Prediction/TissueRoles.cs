namespace ProtoLedger.Regression.Prediction;

/// <summary>What tissues are to a reader of images: which are looked at in a body region, against which one, which flow, which take up contrast agent.</summary>
/// <remarks>Common practice, no source. Names are those of the catalogue; tissues that a catalogue lacks are left out.</remarks>
internal static class TissueRoles
{
    private static readonly Dictionary<string, string[]> ByRegion = new(StringComparer.Ordinal)
    {
        // The first is the reference.
        ["brain"] = ["white-matter", "grey-matter", "csf", "lesion", "fat"],
        ["pituitary"] = ["white-matter", "grey-matter", "csf", "lesion", "fat"],
        ["orbit"] = ["white-matter", "muscle", "csf", "fat", "lesion"],
        ["cervical-spine"] = ["vertebral-marrow", "csf", "white-matter", "disc-nucleus", "fat", "muscle"],
        ["lumbar-spine"] = ["vertebral-marrow", "csf", "disc-nucleus", "disc-annulus", "fat", "muscle"],
        ["knee"] = ["muscle", "cartilage", "synovial-fluid", "yellow-marrow", "fat"],
        ["shoulder"] = ["muscle", "cartilage", "synovial-fluid", "yellow-marrow", "fat"],
        ["hip"] = ["muscle", "synovial-fluid", "yellow-marrow", "fat"],
        ["liver"] = ["liver", "spleen", "kidney-cortex", "fat", "muscle"],
        ["prostate"] = ["muscle", "prostate-peripheral", "prostate-transition", "fat"],
        ["heart"] = ["myocardium", "arterial-blood", "fat", "muscle"],
        ["whole-body"] = ["muscle", "vertebral-marrow", "yellow-marrow", "liver", "spleen", "fat", "csf"],
    };

    private static readonly string[] Elsewhere = ["muscle", "fat", "csf"];

    private static readonly string[] Flowing = ["csf", "arterial-blood", "venous-blood"];

    private static readonly string[] Enhancing =
        ["lesion", "arterial-blood", "venous-blood", "liver", "spleen", "kidney-cortex", "kidney-medulla", "myocardium", "prostate-peripheral", "prostate-transition"];

    /// <summary>Tissues of a region, the reference first.</summary>
    internal static IReadOnlyList<string> Of(string bodyRegion) => ByRegion.GetValueOrDefault(bodyRegion, Elsewhere);

    /// <summary>True for a fluid that moves between preparation and readout.</summary>
    internal static bool Flows(string tissue) => Flowing.Contains(tissue);

    /// <summary>True for a tissue that takes up an extracellular agent; brain has a barrier, fat, fluid and cartilage take up little within minutes.</summary>
    internal static bool Enhances(string tissue) => Enhancing.Contains(tissue);

    /// <summary>True for a fluid that a series may null.</summary>
    internal static bool IsFluid(string tissue) => tissue is "csf" or "synovial-fluid";
}
