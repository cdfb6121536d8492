using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Catalogue;

/// <summary>Document series onto the acquisition model: every pulse that is named becomes the pulse that this scanner plays.</summary>
public static class SeriesMapping
{
    /// <summary>Pulses that every scanner knows unless its own list says otherwise: adiabatic (f = 0.96 ± 0.02) and perfect.</summary>
    public static IReadOnlyDictionary<string, RfPulse> BuiltInPulses { get; } = new Dictionary<string, RfPulse>
    {
        [EfficiencyInversion.Default.Name] = EfficiencyInversion.Default,
        [EfficiencyInversion.Perfect.Name] = EfficiencyInversion.Perfect,
    };

    /// <summary>A series of a protocol as one scanner plays it.</summary>
    /// <param name="series">The series.</param>
    /// <param name="scanner">The scanner.</param>
    /// <param name="pointer">Where the series stands, such as <c>/series/0</c>; begins the pointer of every error.</param>
    public static MappingResult<Series> Resolve(ProtocolSeries series, ScannerDocument scanner, string pointer = "") =>
        Resolve(series.Acquisition, scanner, pointer);

    /// <summary>A series with every <see cref="PulseReference"/> replaced: the scanner's list first, then the built-in pulses.</summary>
    /// <param name="series">The series.</param>
    /// <param name="scanner">The scanner, or null for the built-in pulses alone.</param>
    /// <param name="pointer">Begins the pointer of every error.</param>
    public static MappingResult<Series> Resolve(Series series, ScannerDocument? scanner, string pointer = "")
    {
        var errors = new List<DocumentError>();
        var preparations = series.Preparations.Select((preparation, index) =>
        {
            RfPulse Find(RfPulse pulse)
            {
                if (pulse is not PulseReference(var name))
                    return pulse;
                if (Lookup(name, scanner) is { } found)
                    return found;
                errors.Add(Unknown(name, scanner, $"{JsonPointer.Append(pointer + "/preparations", index)}/pulse"));
                return pulse;
            }

            return preparation switch
            {
                Inversion block => block with { Pulse = Find(block.Pulse) },
                SpectralSaturation block => block with { Pulse = Find(block.Pulse) },
                SpectralInversion block => block with { Pulse = Find(block.Pulse) },
                _ => preparation,
            };
        }).ToArray();
        return errors.Count > 0
            ? new MappingResult<Series>.Refused(errors)
            : new MappingResult<Series>.Mapped(series with { Preparations = preparations });
    }

    /// <summary>The pulse of a name on a scanner, or null where there is none.</summary>
    /// <param name="name">Name in the scanner's list, or built-in.</param>
    /// <param name="scanner">The scanner, or null for the built-in pulses alone.</param>
    public static RfPulse? Lookup(string name, ScannerDocument? scanner) =>
        scanner?.Pulses.GetValueOrDefault(name) ?? BuiltInPulses.GetValueOrDefault(name);

    private static DocumentError Unknown(string name, ScannerDocument? scanner, string pointer)
    {
        var known = (scanner?.Pulses.Keys ?? []).Concat(BuiltInPulses.Keys).Distinct();
        var place = scanner is null ? "among the built-in pulses" : $"on scanner {scanner.Id}";
        return new DocumentError(pointer, $"\"{name}\"", string.Join(", ", known), $"There is no pulse \"{name}\" {place}.");
    }
}
