using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Tests.Comparison;

public sealed class ParametersTests
{
    // Keywords and tags: DICOM PS3.6 (from memory).
    [Theory]
    [InlineData("/series/0/readout/RepetitionTime", "repetition time", "ms", "(0018,0080)")]
    [InlineData("/series/0/readout/ExcitationFlipAngle", "excitation flip angle", "degrees", "(0018,1314)")]
    [InlineData("/series/2/preparations/1/InversionTime", "inversion time", "ms", "(0018,0082)")]
    [InlineData("/series/0/readout/DiffusionBValue", "b value", "s/mm²", "(0018,9087)")]
    [InlineData("/series/0/geometry/FieldOfView", "field of view (read, phase)", "mm", null)]
    [InlineData("/series/0/readout/RefocusingFlipAngles/3", "refocusing flip angles", "degrees", null)]
    [InlineData("/sheet/contrastAgent/dose", "contrast dose", "mmol/kg", null)]
    public void Describe_ParameterOfAProtocol_GivesWordsUnitAndTag(string pointer, string label, string unit, string? tag)
    {
        var info = Parameters.Describe(DocumentKind.Protocol, pointer)!;
        Assert.Equal((label, unit, tag), (info.Label, info.Unit, info.Tag));
        Assert.True(info.IsNumber);
    }

    [Theory]
    [InlineData("/series/0/readout/Repetition")]
    [InlineData("/series/x/readout/RepetitionTime")]
    public void Describe_PlaceOutsideTheFormat_GivesNothing(string pointer) => Assert.Null(Parameters.Describe(DocumentKind.Protocol, pointer));

    [Fact]
    public void ConsoleWording_OfAScanner_GivesWordAndMeaning()
    {
        var scanner = Assert.IsType<ScannerDocument>(Samples.Read(Samples.Scanner).Document);
        Assert.Equal(new ConsoleWord("TR", "cycle"), Parameters.ConsoleWording(scanner, "RepetitionTime"));
        Assert.Null(Parameters.ConsoleWording(scanner, "EchoTime"));
    }
}
