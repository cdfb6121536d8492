using System.Net;
using System.Text.Json.Nodes;
using Npgsql;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Testing.Servers;

namespace ProtoLedger.Server.Tests.Features;

/// <summary>Requests that are wrong in one place each: the answer names the place by pointer and says why, and nothing is stored.</summary>
public sealed class MalformedRequestTests(StoreServerFixture server) : IClassFixture<StoreServerFixture>
{
    private const string Readout = "/document/series/0/readout";
    private const string Proposals = "/api/v1/change-requests";

    /// <summary>Name, address, body, status, pointer, words of the detail.</summary>
    public static TheoryData<string, string, string, int, string, string> Bodies => new()
    {
        { "nothing", Proposals, "", 400, "/kind", "missing" },
        { "no JSON", Proposals, "{", 400, "", "Not JSON" },
        { "two values", Proposals, "{} {}", 400, "", "Not JSON" },
        { "null", Proposals, "null", 400, "-", "null" },
        { "a list", Proposals, "[]", 400, "", "object is needed" },
        { "a text", Proposals, "\"proposal\"", 400, "", "object is needed" },
        { "trailing comma", Proposals, """{"kind":"protocol",}""", 400, "", "Not JSON" },
        { "comment", Proposals, """{"kind":"protocol" /* hm */}""", 400, "", "Not JSON" },
        { "not a number literal", Proposals, """{"baseVersion":NaN}""", 400, "", "Not JSON" },
        { "infinite", Proposals, """{"baseVersion":1e999}""", 400, "/baseVersion", "not finite" },
        { "too deep", Proposals, Nested(70), 400, "", "deeper than" },
        { "key twice", Proposals, """{"kind":"protocol","kind":"scanner"}""", 400, "/kind", "twice" },
        { "key twice in the document", Proposals, """{"document":{"id":"a","id":"b"}}""", 400, "/document/id", "twice" },
        { "NUL", Proposals, """{"reason":"a\u0000b"}""", 400, "/reason", "NUL" },
        { "unpaired surrogate", Proposals, """{"reason":"\ud800"}""", 400, "/reason", "surrogate" },
        { "unknown member", Proposals, """{"kind":"protocol","id":"x","baseVersion":0,"document":{},"reason":"r","state":"approved"}""", 400, "/state", "no member" },
        { "mass-assigned author", Proposals, """{"kind":"protocol","id":"x","baseVersion":0,"document":{},"reason":"r","author":"ada"}""", 400, "/author", "no member" },
        { "member in other case", Proposals, """{"Kind":"protocol"}""", 400, "/Kind", "no member" },
        { "no such kind", Proposals, """{"kind":"magnet"}""", 400, "/kind", "one of protocol" },
        { "kind as a number", Proposals, """{"kind":0}""", 400, "/kind", "one of protocol" },
        { "base as a text", Proposals, """{"baseVersion":"3"}""", 400, "/baseVersion", "whole number" },
        { "base is no whole number", Proposals, """{"baseVersion":3.5}""", 400, "/baseVersion", "whole number" },
        { "base below zero", Proposals, """{"baseVersion":-1}""", 400, "/baseVersion", "outside its limits" },
        { "empty identifier", Proposals, """{"id":""}""", 400, "/id", "outside its limits" },
        { "identifier too long", Proposals, $$"""{"id":"{{new string('x', 101)}}"}""", 400, "/id", "outside its limits" },
        { "reason as a list", Proposals, """{"reason":["a"]}""", 400, "/reason", "needed is a text" },
        { "reason is null", Proposals, """{"reason":null}""", 400, "/reason", "null" },
        { "reason too long", Proposals, $$"""{"reason":"{{new string('r', 4001)}}"}""", 400, "/reason", "outside its limits" },
        { "document is a text", Proposals, """{"kind":"protocol","id":"x","baseVersion":0,"document":"yaml","reason":"r"}""", 422, "/document", "mapping" },
        { "sign-in without a password", "/api/v1/session", """{"name":"tess"}""", 400, "/password", "missing" },
        { "sign-in with a number", "/api/v1/session", """{"name":7,"password":"x"}""", 400, "/name", "needed is a text" },
        { "sign-in with a role", "/api/v1/session", """{"name":"tess","password":"x","role":"administrator"}""", 400, "/role", "no member" },
        { "prediction without tissues", "/api/v1/predictions", """{"series":{}}""", 400, "/tissues", "missing" },
        { "prediction of a text", "/api/v1/predictions", """{"series":"T2","tissues":[]}""", 400, "/series", "object is needed" },
        { "prediction for no tissue", "/api/v1/predictions", """{"series":{},"tissues":[]}""", 422, "/tissues", "no tissue" },
        { "prediction without readout", "/api/v1/predictions", """{"series":{},"tissues":[{"name":"a","T1":1,"T2":1}]}""", 422, "/series/readout", "missing" },
        { "prediction with an unknown key", "/api/v1/predictions", """{"series":{"readouts":{}},"tissues":[{"name":"a","T1":1,"T2":1}]}""", 422, "/series/readouts", "unknown" },
        { "prediction in a dream", "/api/v1/predictions", """{"series":{},"tissues":["white-matter"],"fieldStrength":-3}""", 422, "/fieldStrength", "no such field" },
        { "tissue as a number", "/api/v1/predictions", """{"series":{},"tissues":[3]}""", 422, "/tissues/0", "name of the catalogue" },
        { "tissue without T1", "/api/v1/predictions", """{"series":{},"tissues":[{"name":"a","T2":1}]}""", 422, "/tissues/0/T1", "missing" },
        { "tissue with negative T2", "/api/v1/predictions", """{"series":{},"tissues":[{"name":"a","T1":1,"T2":-1}]}""", 422, "/tissues/0/T2", "outside its limits" },
        { "tissue with an unknown key", "/api/v1/predictions", """{"series":{},"tissues":[{"name":"a","T1":1,"T2":1,"t3":1}]}""", 422, "/tissues/0/t3", "no member" },
        { "B1 as a text", "/api/v1/predictions", """{"series":{},"tissues":["a"],"conditions":[{"b1Scale":"NaN"}]}""", 400, "/conditions/0/b1Scale", "needed is a number" },
        { "B1 of zero", "/api/v1/predictions", """{"series":{},"tissues":["a"],"conditions":[{"b1Scale":0}]}""", 422, "/conditions/0/b1Scale", "outside its limits" },
        { "inflow above one", "/api/v1/predictions", """{"series":{},"tissues":["a"],"conditions":[{"unpreparedInflow":1.5}]}""", 422, "/conditions/0/unpreparedInflow", "outside its limits" },
        { "pulses by number", "/api/v1/predictions", """{"series":{},"tissues":["a"],"pulses":1}""", 400, "/pulses", "one of ideal" },
    };

    /// <summary>Name, pointer into the request, JSON to put there (empty: take away), pointer of the fault, words of the detail.</summary>
    public static TheoryData<string, string, string, string, string> Documents => new()
    {
        { "unknown key", "/document/colour", "\"red\"", "/document/colour", "unknown" },
        { "unknown key deep down", Readout + "/TR", "9000", Readout + "/TR", "unknown" },
        { "missing key", "/document/ageGroup", "", "/document/ageGroup", "missing" },
        { "missing readout", Readout, "", Readout, "missing" },
        { "number as a text", Readout + "/RepetitionTime", "\"9000\"", Readout + "/RepetitionTime", "number in ms" },
        { "null", Readout + "/RepetitionTime", "null", Readout + "/RepetitionTime", "null" },
        { "zero", Readout + "/RepetitionTime", "0", Readout + "/RepetitionTime", "outside the allowed range" },
        { "negative", Readout + "/EchoTime", "-5", Readout + "/EchoTime", "outside the allowed range" },
        { "too large", Readout + "/RepetitionTime", "1e9", Readout + "/RepetitionTime", "outside the allowed range" },
        { "half an echo", Readout + "/EchoTrainLength", "23.5", Readout + "/EchoTrainLength", "whole number" },
        { "no such readout", Readout + "/kind", "\"spiral\"", Readout + "/kind", "no such kind" },
        { "echo between echoes", Readout + "/EchoTime", "123", Readout + "/EchoTime", "no echo of the train" },
        { "train longer than the repetition time", Readout + "/RepetitionTime", "2600", Readout + "/RepetitionTime", "do not fit" },
        { "inversion time without room", "/document/series/0/preparations/0/InversionTime", "4", "/document/series/0/preparations/0/InversionTime", "no room" },
        { "inversion that nothing follows", "/document/series/0/preparations/0/inversionTimeEnd", "\"nextInversion\"", "/document/series/0/preparations/0/inversionTimeEnd", "No inversion follows" },
        { "slices do not fit", "/document/series/0/timing/slices", "300", "/document/series/0/timing/concatenations", "concatenations are needed" },
        { "no slice", "/document/series/0/timing/slices", "0", "/document/series/0/timing/slices", "whole number" },
        { "partial Fourier", "/document/series/0/geometry/partialFourier", "0.3", "/document/series/0/geometry/partialFourier", "outside the allowed range" },
        { "list for a text", "/document/title", "[]", "/document/title", "text is needed" },
        { "empty title", "/document/title", "\"\"", "/document/title", "empty" },
        { "format from the future", "/document/format", "2", "/document/format", "whole number" },
        { "other kind", "/document/kind", "\"scanner\"", "/document/kind", "another kind" },
        { "other identifier", "/document/id", "\"brain-other\"", "/document/id", "another identifier" },
        { "no scanner", "/document/scanners", "[]", "/document/scanners", "0 items" },
        { "scanner that is not there", "/document/scanners", """["linden-3t","maple-3t","nowhere-3t"]""", "/document/scanners/2", "There is no" },
        { "conditions that are not there", "/document/conditions", "\"moon\"", "/document/conditions", "no conditions document" },
        { "pulse that is not there", "/document/series/0/preparations/0/pulse", "\"magic\"", "/document/series/0/preparations/0/pulse", "magic" },
        { "tissues of an age group that the catalogue lacks", "/document/ageGroup", "\"neonate\"", "/document/ageGroup", "No catalogue holds" },
        { "role that does not exist", "/document/requiredSignatures/0/role", "\"surgeon\"", "/document/requiredSignatures/0/role", "allowed words" },
        { "range without the set value", "/document/series/0/allowedRanges", """[{"parameter":"/readout/RepetitionTime","low":1000,"high":2000}]""", "/document/series/0/allowedRanges/0", "outside the range" },
    };

    [Theory]
    [MemberData(nameof(Bodies))]
    public async Task Body_WrongInOnePlace_IsRefusedByPointer(string name, string path, string body, int status, string pointer, string words)
    {
        var before = await CountAsync();
        var answer = await (await server.AsAsync("tess")).CallAsync("POST", path, body);
        AssertRefused(name, answer, status, pointer, words);
        Assert.Equal(before, await CountAsync());
    }

    [Theory]
    [MemberData(nameof(Documents))]
    public async Task Document_WrongInOnePlace_IsRefusedByPointer(string name, string place, string json, string pointer, string words)
    {
        var client = await server.AsAsync("tess");
        var proposal = await client.ProposalAsync("brain-standard");
        Put(proposal, place, json);
        var before = await CountAsync();
        AssertRefused(name, await client.CallAsync("POST", Proposals, proposal), 422, pointer, words);
        Assert.Equal(before, await CountAsync());
    }

    [Theory]
    [InlineData("/api/v1/change-requests?limit=0", "/limit")]
    [InlineData("/api/v1/change-requests?limit=many", "/limit")]
    [InlineData("/api/v1/change-requests?before=-1", "/before")]
    [InlineData("/api/v1/change-requests?state=approve", "/state")]
    [InlineData("/api/v1/change-requests?document=x&kind=magnet", "/kind")]
    [InlineData("/api/v1/protocols?limit=201", "/limit")]
    [InlineData("/api/v1/protocols/brain-standard?format=xml", "/format")]
    [InlineData("/api/v1/protocols/brain-standard/versions/1/provenance", "/pointer")]
    [InlineData("/api/v1/effective?at=yesterday", "/at")]
    [InlineData("/api/v1/effective?at=2026-01-01T00:00:00", "/at")]
    [InlineData("/api/v1/ledger/proofs/inclusion", "/index")]
    [InlineData("/api/v1/ledger/proofs/inclusion?index=-1", "/index")]
    [InlineData("/api/v1/ledger/proofs/consistency?from=0", "/from")]
    [InlineData("/api/v1/runs?before=99999999999999999999", "/before")]
    public async Task Parameter_ThatCannotBeRead_IsNamed(string path, string pointer) =>
        AssertRefused(path, await (await server.AsAsync("tess")).CallAsync("GET", path), 400, pointer, "must be");

    [Fact]
    public async Task Body_BeyondTheLimit_Is413()
    {
        var answer = await (await server.AsAsync("tess")).CallAsync("POST", Proposals, $$"""{"reason":"{{new string('a', 1 << 20)}}"}""");
        Assert.Equal(HttpStatusCode.RequestEntityTooLarge, answer.Status);
        Assert.Equal("too-large", answer.Problem);
    }

    [Fact]
    public async Task Body_OfAnotherMediaType_Is415()
    {
        using var content = new StringContent("kind: protocol", System.Text.Encoding.UTF8, "application/yaml");
        using var request = new HttpRequestMessage(HttpMethod.Post, Proposals) { Content = content };
        request.Headers.Add("Idempotency-Key", "k");
        using var answer = await (await server.AsAsync("tess")).SendAsync(request);
        Assert.Equal(HttpStatusCode.UnsupportedMediaType, answer.StatusCode);
    }

    private static void AssertRefused(string name, Answer answer, int status, string pointer, string words)
    {
        Assert.True(status == (int)answer.Status, $"{name}: {answer.Status} {answer.Text}");
        Assert.Equal(status == 400 ? "malformed-request" : "invalid-content", answer.Problem);
        Assert.NotEmpty(answer.Json["traceId"]!.GetValue<string>());
        if (pointer == "-")
        {
            Assert.Contains(words, answer.Json["detail"]!.GetValue<string>(), StringComparison.Ordinal);
            return;
        }

        var fault = answer.Json["errors"]!.AsArray().FirstOrDefault(e => e!["pointer"]!.GetValue<string>() == pointer);
        Assert.True(fault is not null, $"{name}: {answer.Text}");
        Assert.Contains(words, fault["detail"]!.GetValue<string>(), StringComparison.OrdinalIgnoreCase);
    }

    private static void Put(JsonObject root, string place, string json)
    {
        var tokens = JsonPointer.Tokens(place);
        JsonNode node = root;
        foreach (var token in tokens.SkipLast(1))
            node = node is JsonArray list ? list[int.Parse(token, System.Globalization.CultureInfo.InvariantCulture)]! : node[token]!;
        if (node is JsonArray array)
            array[int.Parse(tokens[^1], System.Globalization.CultureInfo.InvariantCulture)] = JsonNode.Parse(json);
        else if (json.Length == 0)
            node.AsObject().Remove(tokens[^1]);
        else
            node[tokens[^1]] = JsonNode.Parse(json);
    }

    private static string Nested(int depth) => string.Concat(Enumerable.Repeat("[", depth)) + string.Concat(Enumerable.Repeat("]", depth));

    private async Task<string> CountAsync()
    {
        await using var command = server.Source.CreateCommand(
            "SELECT concat_ws(' ', (SELECT count(*) FROM document), (SELECT count(*) FROM change_request), (SELECT count(*) FROM ledger_leaf), (SELECT count(*) FROM blob), (SELECT count(*) FROM run))");
        return (string)(await command.ExecuteScalarAsync())!;
    }
}
