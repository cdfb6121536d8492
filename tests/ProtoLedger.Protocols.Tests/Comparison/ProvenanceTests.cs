using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Tests.Comparison;

public sealed class ProvenanceTests
{
    private static readonly string[] Parts = Samples.Protocol.Split("  - id: ");

    private static readonly (int, byte[])[] Versions =
    [
        (1, Bytes(Samples.Protocol)),
        (2, Bytes(Samples.Protocol.With("RepetitionTime: 9000", "RepetitionTime: 8600"))),
        // Another series is put in front: the pointer moves, the value does not.
        (3, Bytes(string.Concat(Parts[0], "  - id: ", Parts[3], "  - id: ", Parts[1].With("RepetitionTime: 9000", "RepetitionTime: 8600"), "  - id: ", Parts[2]))),
        (4, Bytes(string.Concat(Parts[0], "  - id: ", Parts[3], "  - id: ", Parts[1].With("RepetitionTime: 9000", "RepetitionTime: 9500"), "  - id: ", Parts[2]))),
    ];

    [Fact]
    public void Trace_ParameterOfASeriesThatMoved_NamesEverySetting()
    {
        var steps = Provenance.Trace(DocumentKind.Protocol, Versions, "/series/1/readout/RepetitionTime");
        Assert.Equal([4, 2, 1], steps.Select(step => step.Version));
        Assert.Equal([9500, 8600, 9000], steps.Select(step => step.Value!.GetValue<double>()));
        Assert.Equal("/series/0/readout/RepetitionTime", steps[1].Pointer);
    }

    [Fact]
    public void Trace_ParameterThatNeverChanged_NamesTheFirstVersion() =>
        Assert.Equal([1], Provenance.Trace(DocumentKind.Protocol, Versions, "/series/1/readout/EchoTime").Select(step => step.Version));

    [Fact]
    public void Trace_ListOfPlainValues_IsFollowedAsAWhole() =>
        Assert.Equal([1], Provenance.Trace(DocumentKind.Protocol, Versions, "/series/1/readout/RefocusingFlipAngles/0").Select(step => step.Version));

    [Fact]
    public void Trace_PlaceThatTheNewestVersionLacks_IsEmpty() =>
        Assert.Empty(Provenance.Trace(DocumentKind.Protocol, Versions, "/series/7/readout/EchoTime"));

    private static byte[] Bytes(string yaml) => Samples.Read(yaml).CanonicalBytes;
}
