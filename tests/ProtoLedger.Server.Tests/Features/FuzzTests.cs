using System.Net;
using System.Text;
using System.Text.Json.Nodes;
using ProtoLedger.Testing.Servers;

namespace ProtoLedger.Server.Tests.Features;

/// <summary>Random requests made from the server's own OpenAPI document: none may end in 5xx, and none in a status that the document does not list.</summary>
/// <remarks>The seed is fixed; a failing request is printed whole.</remarks>
public sealed class FuzzTests(StoreServerFixture server) : IClassFixture<StoreServerFixture>
{
    private const int Seed = 20260101;
    private const int Requests = 2000;

    private static readonly JsonNode?[] Oddities =
    [
        null, JsonValue.Create(true), JsonValue.Create(0), JsonValue.Create(-1), JsonValue.Create(1e308), JsonValue.Create(0.1), JsonValue.Create(2147483648L),
        JsonValue.Create(""), JsonValue.Create("NaN"), JsonValue.Create("'; DROP TABLE account; --"), JsonValue.Create("<script>alert(1)</script>"),
        JsonValue.Create("../../etc/passwd"), JsonValue.Create("\u202Etxt.exe"), JsonValue.Create("a\r\nX-Evil: 1"), JsonValue.Create(new string('x', 5000)),
        new JsonArray(), new JsonObject(), new JsonArray(new JsonArray(new JsonArray())),
    ];

    private static readonly string[] OddTexts =
        ["0", "1", "-1", "999999999999999999999", "1.5", "a", "%00", "%0d%0aX:1", "..%2f..%2f", "%F0%9F%98%80", "brain-standard", "null", "'%22%3c", new string('9', 300)];

    [Fact]
    public async Task RandomRequests_NeverFailInside_AndAnswerAsDocumented()
    {
        var document = JsonNode.Parse(await server.Anonymous.GetStringAsync("/openapi/v1.json"))!;
        var operations = document["paths"]!.AsObject()
            .SelectMany(path => path.Value!.AsObject().Select(o => (Method: o.Key.ToUpperInvariant(), Path: path.Key, Operation: o.Value!)))
            // A stream of events lasts as long as its run, and a session that ends takes the next requests with it.
            .Where(o => o is not { Method: "DELETE", Path: "/api/v1/session" } && !o.Path.EndsWith("/events", StringComparison.Ordinal)).ToList();
        var people = ServerFixture.People.Keys.ToList();
        var random = new Random(Seed);
        var faults = new List<string>();
        for (var i = 0; i < Requests; i++)
        {
            var (method, path, operation) = operations[random.Next(operations.Count)];
            using var request = Make(random, method, path, operation);
            var client = random.Next(20) == 0 ? server.Anonymous : await server.AsAsync(people[random.Next(people.Count)]);
            using var answer = await client.SendAsync(request);
            var sent = request.Content is null ? "" : await request.Content.ReadAsStringAsync();
            var documented = operation["responses"]!.AsObject().Select(r => r.Key);
            // A path parameter that does not fit its constraint is another address: 404 and 405 are always possible, and a parameter may end the path early.
            if (answer.StatusCode >= HttpStatusCode.InternalServerError
                || !(documented.Contains($"{(int)answer.StatusCode}") || answer.StatusCode is HttpStatusCode.NotFound or HttpStatusCode.MethodNotAllowed or HttpStatusCode.BadRequest or HttpStatusCode.Redirect))
                faults.Add($"{i}: {method} {request.RequestUri} {sent[..Math.Min(300, sent.Length)]} -> {(int)answer.StatusCode} {await answer.Content.ReadAsStringAsync()}");
        }

        Assert.True(faults.Count == 0, string.Join('\n', faults));
    }

    private static HttpRequestMessage Make(Random random, string method, string path, JsonNode operation)
    {
        var query = new StringBuilder();
        foreach (var parameter in operation["parameters"]?.AsArray() ?? [])
        {
            var name = parameter!["name"]!.GetValue<string>();
            var value = OddTexts[random.Next(OddTexts.Length)];
            switch (parameter["in"]!.GetValue<string>())
            {
                case "path":
                    path = path.Replace($"{{{name}}}", value, StringComparison.Ordinal);
                    break;
                case "query" when random.Next(3) > 0:
                    query.Append(query.Length == 0 ? '?' : '&').Append(name).Append('=').Append(value);
                    break;
            }
        }

        var request = new HttpRequestMessage(new HttpMethod(method), path + query);
        if (random.Next(8) > 0)
            request.Headers.TryAddWithoutValidation("Idempotency-Key", $"fuzz-{random.Next(500)}");
        if (random.Next(4) > 0)
            request.Headers.TryAddWithoutValidation("If-Match", new[] { "\"1\"", "*", "W/\"1\"", "1", "\"\"", "\"99999999999999999999\"" }[random.Next(6)]);
        if (operation["requestBody"] is { } body)
        {
            var example = body["content"]!["application/json"]!["example"]!.DeepClone();
            for (var changes = random.Next(3); changes > 0; changes--)
                Change(random, example);
            var text = example.ToJsonString();
            if (random.Next(15) == 0)
                text = text[..random.Next(text.Length)];
            request.Content = new StringContent(text, Encoding.UTF8, random.Next(40) == 0 ? "text/plain" : "application/json");
        }

        return request;
    }

    private static void Change(Random random, JsonNode node)
    {
        switch (node)
        {
            case JsonObject members when members.Count > 0:
                var name = members.ElementAt(random.Next(members.Count)).Key;
                if (members[name] is JsonObject or JsonArray && random.Next(2) == 0)
                    Change(random, members[name]!);
                else if (random.Next(5) == 0)
                    members.Remove(name);
                else
                    members[name] = Oddities[random.Next(Oddities.Length)]?.DeepClone();
                break;
            case JsonArray items when items.Count > 0:
                var index = random.Next(items.Count);
                if (items[index] is JsonObject or JsonArray && random.Next(2) == 0)
                    Change(random, items[index]!);
                else
                    items[index] = Oddities[random.Next(Oddities.Length)]?.DeepClone();
                break;
        }
    }
}
