using System.Text.Json.Nodes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.History;

/// <summary>Facts about loading at a console.</summary>
internal static class LoadedFacts
{
    /// <summary>Type of the fact.</summary>
    public const string Type = "loaded";

    /// <summary>Step of whoever enters the values.</summary>
    public const string Entered = "entered";

    /// <summary>Step of the second person.</summary>
    public const string Checked = "checked";

    /// <summary>Every value of a loading fact.</summary>
    public static JsonObject Values(LoadedRow row) => new()
    {
        ["protocol"] = row.Protocol,
        ["version"] = row.Version,
        ["scanner"] = row.Scanner,
        ["step"] = row.Step,
        ["account"] = row.Account,
        ["at"] = VersionFacts.Time(row.At),
    };
}
