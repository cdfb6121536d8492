using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Protocols.Tests.Validation;

public sealed class CrossDocumentValidationTests
{
    private static readonly DocumentSet Set = new(DocumentKinds.All.Select(kind => Samples.Read(Samples.Of(kind)).Document));

    [Fact]
    public void Validate_DocumentsThatFit_FindsNothing() =>
        Assert.All(Set.All<LedgerDocument>(), document => Assert.Empty(CrossDocumentValidation.Validate(document, Set)));

    [Theory]
    [InlineData("scanners: [linden-3t]", "scanners: [linden-3t, oak-7t]", "/scanners/1", "There is no scanner of this name", "linden-3t")]
    [InlineData("conditions: brain", "conditions: knee", "/conditions", "There is no conditions document", "brain")]
    [InlineData("ageGroup: adult", "ageGroup: infant", "/ageGroup", "values of another age group are not taken", "adult")]
    [InlineData("ageGroup: adult", "ageGroup: adult\nvariantOf: brain-old", "/variantOf", "There is no protocol of this name", "an existing protocol")]
    [InlineData("pulse: adiabatic", "pulse: sinc-inversion", "/series/0/preparations/0/pulse", "There is no pulse \"sinc-inversion\" on scanner linden-3t", "hyperbolic-secant, sampled, adiabatic, perfect")]
    [InlineData("echoSpacing: 10, EchoTrainLength: 24", "echoSpacing: 3, EchoTrainLength: 40", "/series/0/readout/echoSpacing", "shorter than scanner linden-3t can play", "≥ 3.6 ms")]
    public void Validate_ProtocolThatRefersToNothing_SaysWhatThereIs(string old, string replacement, string pointer, string text, string limit)
    {
        var error = Assert.Single(Errors(Samples.Protocol.With(old, replacement)));
        Assert.Equal((pointer, limit), (error.Pointer, error.Limit));
        Assert.Contains(text, error.Detail, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("protocol: brain-sample", "protocol: brain", "/protocol", "There is no protocol of this name")]
    [InlineData("series: fluid-nulled", "series: dark-fluid", "/expectations/0/series", "holds no series of this name")]
    [InlineData("conditions: [typical]", "conditions: [typical, metal]", "/expectations/0/conditions/1", "holds no such condition")]
    [InlineData("tissue: csf", "tissue: bile", "/expectations/0/observable/tissue", "holds no tissue \"bile\"")]
    [InlineData("limit: 0.6", "limit: 0.6\n    scanners: [oak-7t]", "/expectations/0/scanners/0", "not assigned to this scanner")]
    [InlineData("series: fluid-nulled\n    observable: {name: residualRatio, tissue: csf", "series: opposed\n    observable: {name: residualRatio, tissue: csf", "/expectations/0/observable/tissue", "T2* of \"csf\" at 3 T is unknown")]
    public void Validate_ExpectationThatRefersToNothing_SaysWhat(string old, string replacement, string pointer, string text)
    {
        var error = Assert.Single(Errors(Samples.Expectations.With(old, replacement)));
        Assert.Equal(pointer, error.Pointer);
        Assert.Contains(text, error.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Validate_ScannerWithoutAPulseThatAProtocolNames_NamesTheProtocol()
    {
        var uses = Samples.Read(Samples.Protocol.With("pulse: adiabatic", "pulse: sampled")).Document;
        var without = Samples.Read(Samples.Scanner.With("  sampled: {kind: sampled, duration: 2, amplitude: [100, 200], phase: [0, 90]}\n", "")).Document;
        var error = Assert.Single(CrossDocumentValidation.Validate(without, Set.With(uses)));
        Assert.Equal("protocol brain-sample", error.Value);
        Assert.Contains("would break protocol brain-sample at /series/0/preparations/0/pulse", error.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Validate_ProtocolWithoutASeriesThatAnExpectationNames_NamesTheExpectation()
    {
        var error = Assert.Single(Errors(Samples.Protocol.With("id: fluid-nulled", "id: dark-fluid")));
        Assert.Equal("expectations brain-sample", error.Value);
    }

    [Fact]
    public void Validate_CatalogueWithoutATissueThatAnExpectationNames_NamesTheExpectation()
    {
        var error = Assert.Single(Errors(Samples.Catalogue.With("name: csf", "name: fluid")));
        Assert.Contains("would break expectations brain-sample", error.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Validate_PulseLongerThanTheInversionTimeAllows_IsFoundOnTheScanner()
    {
        // By name alone the pulse counts with 10 ms; this scanner's lasts 100 ms, half of which does not fit before the second inversion.
        var slow = Samples.Read(Samples.Scanner.With("duration: 10.24, beta: 800", "duration: 100, beta: 80")).Document;
        var protocol = Samples.Read(Samples.Protocol.With("InversionTime: 500}", "InversionTime: 40, pulse: hyperbolic-secant}")).Document;
        var error = Assert.Single(CrossDocumentValidation.Validate(protocol, Set.With(slow)));
        Assert.Equal(("/series/1/preparations/1/InversionTime", "≥ 51 ms"), (error.Pointer, error.Limit));
        Assert.StartsWith("On scanner linden-3t", error.Detail, StringComparison.Ordinal);
    }

    private static IReadOnlyList<DocumentError> Errors(string yaml) => CrossDocumentValidation.Validate(Samples.Read(yaml).Document, Set);
}
