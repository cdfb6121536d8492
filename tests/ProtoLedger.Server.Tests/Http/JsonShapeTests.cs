using System.ComponentModel.DataAnnotations;
using System.Text.Json;
using System.Text.Json.Nodes;
using System.Text.Json.Serialization.Metadata;
using ProtoLedger.Server.Hosting;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Tests.Http;

public sealed class JsonShapeTests
{
    private static readonly JsonSerializerOptions Options = MakeOptions();

    [Theory]
    [InlineData("""{"name":"a","count":1}""", "")]
    [InlineData("""{"name":"a","count":1,"when":"2030-01-31T08:00:00+02:00","parts":[{"size":0.5}]}""", "")]
    [InlineData("""{"name":"a","count":1,"note":null}""", "")]
    [InlineData("""{"name":null,"count":1}""", "/name")]
    [InlineData("""{"count":1}""", "/name")]
    [InlineData("""{"name":"a","count":1.5}""", "/count")]
    [InlineData("""{"name":"a","count":"1"}""", "/count")]
    [InlineData("""{"name":"a","count":11}""", "/count")]
    [InlineData("""{"name":"abcdef","count":1}""", "/name")]
    [InlineData("""{"name":"a","count":1,"when":"2030-01-31T08:00:00"}""", "/when")]
    [InlineData("""{"name":"a","count":1,"parts":[{"size":1},{"size":"big","~/":1}]}""", "/parts/1/size /parts/1/~0~1")]
    [InlineData("""{"name":"a","count":1,"colour":"Red"}""", "/colour")]
    [InlineData("""{"name":"a","count":1,"colour":1}""", "/colour")]
    [InlineData("[]", "<whole>")]
    public void Check_NamesEveryFaultByPointer(string json, string pointers)
    {
        var faults = JsonShape.Check(JsonNode.Parse(json), Options.GetTypeInfo(typeof(Thing)), Options);
        Assert.Equal(pointers, string.Join(' ', faults.Select(f => f.Pointer.Length == 0 ? "<whole>" : f.Pointer)));
        Assert.All(faults, f => Assert.NotEmpty(f.Detail));
    }

    private static JsonSerializerOptions MakeOptions()
    {
        var options = new JsonSerializerOptions { TypeInfoResolver = new DefaultJsonTypeInfoResolver() };
        JsonSettings.Apply(options);
        return options;
    }

    internal enum Colour
    {
        Red,
        DarkBlue,
    }

    internal sealed record Thing(
        [property: StringLength(5, MinimumLength = 1)] string Name, [property: Range(1.0, 10.0)] int Count,
        string? Note = null, DateTimeOffset? When = null, IReadOnlyList<Part>? Parts = null, Colour? Colour = null);

    internal sealed record Part(double Size);
}
