using System.Net;
using System.Net.Http.Headers;
using System.Net.Http.Json;
using System.Text.Json.Nodes;

namespace ProtoLedger.Cli.KillTesting;

/// <summary>A client that repeats a request with its Idempotency-Key until it has a definite answer, and remembers what was acknowledged.</summary>
internal sealed class Client(string url, string person) : IDisposable
{
    private static readonly TimeSpan Pause = TimeSpan.FromMilliseconds(100);
    private readonly HttpClient http = new() { BaseAddress = new Uri(url), Timeout = TimeSpan.FromSeconds(10) };

    /// <summary>Reasons of the proposals that were acknowledged, with their numbers.</summary>
    public Dictionary<string, long> Acknowledged { get; } = [];

    /// <summary>Requests whose first answer was lost, and which a repetition settled.</summary>
    public int Settled { get; private set; }

    /// <summary>Proposes, edits, submits and withdraws until it is told to stop.</summary>
    /// <param name="protocol">Identifier of the protocol to propose on.</param>
    /// <param name="cancellationToken">Stops it after the request in hand.</param>
    public async Task WorkAsync(string protocol, CancellationToken cancellationToken)
    {
        await SignInAsync();
        for (var number = 0; !cancellationToken.IsCancellationRequested; number++)
        {
            var (_, stored, _) = await SendAsync(HttpMethod.Get, $"/api/v1/protocols/{protocol}", null, null);
            var document = stored["document"]!.DeepClone();
            var reason = $"{person} {Guid.NewGuid():N}";
            document["note"] = reason;
            var (status, made, tag) = await SendAsync(HttpMethod.Post, "/api/v1/change-requests", new JsonObject
            {
                ["kind"] = "protocol",
                ["id"] = protocol,
                ["baseVersion"] = stored["version"]!["version"]!.DeepClone(),
                ["document"] = document.DeepClone(),
                ["reason"] = reason,
            }, null);
            if (status != HttpStatusCode.Created)
                continue;
            var id = made["id"]!.GetValue<long>();
            Acknowledged.Add(reason, id);
            document["note"] = reason + ", edited";
            (status, _, var edited) = await SendAsync(HttpMethod.Put, $"/api/v1/change-requests/{id}", new JsonObject { ["document"] = document }, tag);
            if (status == HttpStatusCode.OK)
                tag = edited;
            (status, _, var submitted) = await SendAsync(HttpMethod.Post, $"/api/v1/change-requests/{id}/submit", null, tag);
            if (status == HttpStatusCode.OK)
                await SendAsync(HttpMethod.Post, $"/api/v1/change-requests/{id}/withdraw", new JsonObject { ["reason"] = "end of the round" }, submitted);
        }
    }

    /// <summary>Numbers of all proposals by their reasons.</summary>
    public async Task<ILookup<string, long>> ListAsync()
    {
        await SignInAsync();
        var found = new List<(string Reason, long Id)>();
        for (var path = "/api/v1/change-requests?limit=200"; ;)
        {
            var (_, page, _) = await SendAsync(HttpMethod.Get, path, null, null);
            var items = page["items"]!.AsArray();
            found.AddRange(items.Select(i => (i!["reason"]!.GetValue<string>(), i["id"]!.GetValue<long>())));
            if (items.Count < 200)
                return found.ToLookup(f => f.Reason, f => f.Id);
            path = $"/api/v1/change-requests?limit=200&before={found[^1].Id}";
        }
    }

    public void Dispose() => http.Dispose();

    private async Task SignInAsync()
    {
        var (_, session, _) = await SendAsync(HttpMethod.Post, "/api/v1/session", new JsonObject { ["name"] = person, ["password"] = ServerProcess.Password }, null);
        http.DefaultRequestHeaders.Authorization = new AuthenticationHeaderValue("Bearer", session["token"]!.GetValue<string>());
    }

    private async Task<(HttpStatusCode Status, JsonNode Body, string? Tag)> SendAsync(HttpMethod method, string path, JsonNode? body, string? tag)
    {
        var key = Guid.NewGuid().ToString();
        for (var attempt = 0; ; attempt++)
        {
            try
            {
                using var request = new HttpRequestMessage(method, path);
                if (body is not null)
                    request.Content = JsonContent.Create(body);
                if (tag is not null)
                    request.Headers.TryAddWithoutValidation("If-Match", tag);
                request.Headers.Add("Idempotency-Key", key);
                using var answer = await http.SendAsync(request);
                var inFlight = answer.StatusCode == HttpStatusCode.Conflict && (await answer.Content.ReadAsStringAsync()).Contains("request-in-flight", StringComparison.Ordinal);
                if (answer.StatusCode < HttpStatusCode.InternalServerError && !inFlight)
                {
                    Settled += attempt > 0 ? 1 : 0;
                    var text = await answer.Content.ReadAsStringAsync();
                    return (answer.StatusCode, text.Length == 0 ? new JsonObject() : JsonNode.Parse(text)!, answer.Headers.ETag?.ToString());
                }
            }
            catch (Exception lost) when (lost is HttpRequestException or TaskCanceledException or IOException)
            {
                // nobody knows whether it happened: the same key settles it
            }

            await Task.Delay(Pause);
        }
    }
}
