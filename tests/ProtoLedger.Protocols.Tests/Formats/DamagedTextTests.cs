using System.Text;
using System.Text.Json.Nodes;
using CsCheck;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;

namespace ProtoLedger.Protocols.Tests.Formats;

/// <summary>Texts damaged at random: the reader answers with a document or with errors, and never with an exception.</summary>
public sealed class DamagedTextTests
{
    private const string Pieces = "{}[]:,-#&*!|>'\"%@`~?<.0123456789eE+ \n\tabNaNinf\u0000\u2028\ud800é";

    private static readonly Gen<DocumentKind> Kinds = Gen.Int[0, 4].Select(index => DocumentKinds.All[index]);

    [Fact]
    public void ReadYaml_DamagedText_AnswersWithAResult() =>
        Gen.Select(Kinds, Damage).Sample(
            (kind, damage) => AssertAnswer(DocumentReader.ReadYaml(Apply(Samples.Of(kind), damage))), iter: 1500, seed: "0N0XIzNsQ0O2");

    [Fact]
    public void ReadJson_DamagedText_AnswersWithAResult() =>
        Gen.Select(Kinds, Damage).Sample(
            (kind, damage) => AssertAnswer(DocumentReader.ReadJson(Encoding.UTF8.GetBytes(Apply(Encoding.UTF8.GetString(Samples.Read(Samples.Of(kind)).CanonicalBytes), damage)))),
            iter: 1500,
            seed: "0N0XIzNsQ0O2");

    // Any value of the wrong kind at any place of a document.
    [Fact]
    public void ReadTree_WrongValueAnywhere_AnswersWithAResult()
    {
        JsonNode?[] wrong = [null, true, -1, 1e308, double.NaN, "", "text", "\ud800", new JsonArray(), new JsonArray(1, "a", null), new JsonObject(), new JsonObject { ["kind"] = 7 }];
        foreach (var kind in DocumentKinds.All)
        {
            var bytes = Samples.Read(Samples.Of(kind)).CanonicalBytes;
            foreach (var pointer in Pointers(JsonNode.Parse(bytes), ""))
                foreach (var value in wrong)
                    AssertAnswer(ParameterEditOf(bytes, pointer, value));
        }
    }

    private static ParseResult ParameterEditOf(byte[] bytes, string pointer, JsonNode? value)
    {
        var tree = JsonNode.Parse(bytes)!;
        var tokens = JsonPointer.Tokens(pointer);
        JsonPointer.TryFind(tree, pointer[..pointer.LastIndexOf('/')], out var parent);
        if (parent is JsonArray items)
            items[int.Parse(tokens[^1], System.Globalization.CultureInfo.InvariantCulture)] = value?.DeepClone();
        else
            parent!.AsObject()[tokens[^1]] = value?.DeepClone();
        return DocumentReader.ReadTree(tree);
    }

    private static IEnumerable<string> Pointers(JsonNode? node, string pointer)
    {
        var children = node switch
        {
            JsonObject members => members.Select(member => (Pointer: JsonPointer.Append(pointer, member.Key), member.Value)),
            JsonArray items => items.Select((item, index) => (Pointer: JsonPointer.Append(pointer, index), Value: item)),
            _ => [],
        };
        return children.SelectMany(child => Pointers(child.Value, child.Pointer).Prepend(child.Pointer));
    }

    private static Gen<(double Place, int Length, string Text)[]> Damage =>
        Gen.Select(Gen.Double[0, 1], Gen.Int[0, 6], Gen.Char[Pieces].Array[0, 4].Select(characters => new string(characters))).Array[1, 3];

    private static string Apply(string text, (double Place, int Length, string Text)[] damage)
    {
        foreach (var (place, length, piece) in damage)
        {
            var at = (int)(place * (text.Length - 1));
            text = text[..at] + piece + text[Math.Min(text.Length, at + length)..];
        }

        return text;
    }

    private static void AssertAnswer(ParseResult result)
    {
        switch (result)
        {
            case ParseResult.Refused refused:
                Assert.NotEmpty(refused.Errors);
                Assert.All(refused.Errors, error => Assert.NotEmpty(error.Detail));
                break;
            case ParseResult.Parsed parsed:
                var again = Samples.Read(YamlExport.Write(parsed.CanonicalBytes));
                Assert.Equal(parsed.Sha256, again.Sha256);
                break;
        }
    }
}
