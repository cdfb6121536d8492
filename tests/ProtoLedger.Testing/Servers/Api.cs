using System.Net;
using System.Net.Http.Headers;
using System.Text;
using System.Text.Json.Nodes;

namespace ProtoLedger.Testing.Servers;

/// <summary>Requests as a client of the interface sends them.</summary>
public static class Api
{
    /// <summary>Sends a request and reads the whole answer.</summary>
    /// <param name="client">The client.</param>
    /// <param name="method">Method.</param>
    /// <param name="path">Address.</param>
    /// <param name="body">JSON, a text that is sent as it is, or nothing.</param>
    /// <param name="ifMatch">Entity tag with its quotes.</param>
    /// <param name="key">Idempotency-Key; null for a new one, empty for none.</param>
    public static async Task<Answer> CallAsync(
        this HttpClient client, string method, string path, object? body = null, string? ifMatch = null, string? key = null)
    {
        ArgumentNullException.ThrowIfNull(client);
        using var request = new HttpRequestMessage(new HttpMethod(method), path);
        if (body is not null)
            request.Content = new StringContent(
                body as string ?? (body as JsonNode)?.ToJsonString() ?? System.Text.Json.JsonSerializer.Serialize(body), Encoding.UTF8, "application/json");
        if (ifMatch is not null)
            request.Headers.TryAddWithoutValidation("If-Match", ifMatch);
        if (key != "" && method == "POST")
            request.Headers.Add("Idempotency-Key", key ?? Guid.NewGuid().ToString());
        using var answer = await client.SendAsync(request);
        var text = await answer.Content.ReadAsStringAsync();
        return new Answer(answer.StatusCode, text, answer.Headers, answer.Content.Headers);
    }

    /// <summary>A proposal on the newest version of a protocol, changed as asked, as the body of a request.</summary>
    /// <param name="client">A signed-in client.</param>
    /// <param name="protocol">Identifier.</param>
    /// <param name="change">What to change in the document.</param>
    public static async Task<JsonObject> ProposalAsync(this HttpClient client, string protocol, Action<JsonObject>? change = null)
    {
        var stored = (await client.CallAsync("GET", $"/api/v1/protocols/{protocol}")).Json;
        var document = stored["document"]!.AsObject();
        change?.Invoke(document);
        return new JsonObject
        {
            ["kind"] = "protocol",
            ["id"] = protocol,
            ["baseVersion"] = stored["version"]!["version"]!.DeepClone(),
            ["document"] = document.DeepClone(),
            ["reason"] = "Shorter examination",
        };
    }
}

/// <summary>An answer, read.</summary>
/// <param name="Status">Status.</param>
/// <param name="Text">Body.</param>
/// <param name="Headers">Headers.</param>
/// <param name="ContentHeaders">Headers of the body.</param>
public sealed record Answer(HttpStatusCode Status, string Text, HttpResponseHeaders Headers, HttpContentHeaders ContentHeaders)
{
    /// <summary>The body as JSON.</summary>
    public JsonNode Json => JsonNode.Parse(Text)!;

    /// <summary>Entity tag with its quotes, or null.</summary>
    public string? Tag => Headers.ETag?.ToString();

    /// <summary>Name of the problem, or null.</summary>
    public string? Problem => ContentHeaders.ContentType?.MediaType == "application/problem+json" ? Json["type"]!.GetValue<string>()["/problems/".Length..] : null;

    /// <summary>Pointers of the faults of a problem.</summary>
    public IReadOnlyList<string> Pointers => [.. (Json["errors"]?.AsArray() ?? []).Select(e => e!["pointer"]!.GetValue<string>())];
}
