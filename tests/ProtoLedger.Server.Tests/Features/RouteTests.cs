using System.Net;
using System.Text.Json.Nodes;
using System.Text.RegularExpressions;
using Microsoft.AspNetCore.Routing;
using Microsoft.Extensions.DependencyInjection;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;
using ProtoLedger.Testing.Servers;

namespace ProtoLedger.Server.Tests.Features;

/// <summary>Who may use which address: the running application's own list of routes against the table in docs/access.md, and each pair for real.</summary>
public sealed partial class RouteTests(ServerFixture server) : IClassFixture<ServerFixture>
{
    private List<RouteEndpoint> Routes =>
        [.. server.Services.GetRequiredService<IEnumerable<EndpointDataSource>>().SelectMany(s => s.Endpoints).OfType<RouteEndpoint>().OrderBy(e => e.RoutePattern.RawText, StringComparer.Ordinal)];

    [Fact]
    public void EveryRoute_HasARule() =>
        Assert.Empty(Routes.Where(route => route.Metadata.GetMetadata<RoleRule>() is null).Select(route => route.RoutePattern.RawText));

    [Fact]
    public void AccessPage_ShowsEveryRouteWithItsRule()
    {
        var lines = new List<string> { "| method | address | rule | " + string.Join(" | ", Roles.All) + " | not signed in |" };
        lines.Add("|" + string.Concat(Enumerable.Repeat(" --- |", Roles.All.Count + 4)));
        foreach (var (method, route) in Routes.SelectMany(r => MethodsOf(r).Select(m => (m, r))))
        {
            var rule = route.Metadata.GetMetadata<RoleRule>()!;
            var cells = Roles.All.Select(role => rule.Allows(new Actor("a", "A", [role])) ? "yes" : "no");
            lines.Add($"| {method} | `{Address(route)}` | {rule.Name} | {string.Join(" | ", cells)} | {(rule.AllowsAnonymous ? "yes" : "no")} |");
        }

        var page = SourceTree.Of("docs", "access.md");
        var text = File.ReadAllText(page);
        var expected = Table().Replace(text, m => $"{m.Groups[1].Value}\n{string.Join('\n', lines)}\n{m.Groups[2].Value}");
        if (Environment.GetEnvironmentVariable("PROTOLEDGER_WRITE_DOCS") == "1")
            File.WriteAllText(page, expected);
        Assert.Equal(expected, text);
    }

    [Fact]
    public async Task EveryRoute_LetsPassExactlyWhomItsRuleAllows()
    {
        using var stranger = new HttpClient(new HttpClientHandler { AllowAutoRedirect = false }) { BaseAddress = server.Anonymous.BaseAddress };
        var wrong = new List<string>();
        foreach (var (method, route) in Routes.SelectMany(r => MethodsOf(r).Select(m => (m, r))).Where(p => !p.r.RoutePattern.RawText!.StartsWith("/api/v1/session", StringComparison.Ordinal)))
        {
            var rule = route.Metadata.GetMetadata<RoleRule>()!;
            foreach (var person in ServerFixture.People.Keys)
            {
                var status = await SendAsync(await server.AsAsync(person), method, route);
                var denied = status == HttpStatusCode.Forbidden;
                if (denied == rule.Allows(new Actor(person, person, [ServerFixture.People[person]])) || status >= HttpStatusCode.InternalServerError || status == HttpStatusCode.Unauthorized)
                    wrong.Add($"{person} {method} {route.RoutePattern.RawText}: {status}");
            }

            // A page sends a stranger to sign in; the interface says 401.
            var anonymous = await SendAsync(stranger, method, route);
            var turnedAway = anonymous == (route.Metadata.GetMetadata<PageRoute>() is null ? HttpStatusCode.Unauthorized : HttpStatusCode.Found);
            if (turnedAway == rule.AllowsAnonymous)
                wrong.Add($"nobody {method} {route.RoutePattern.RawText}: {anonymous}");
        }

        Assert.True(wrong.Count == 0, string.Join('\n', wrong));
    }

    [Fact]
    public async Task EveryAnswer_CarriesTheSecurityHeaders()
    {
        foreach (var path in new[] { "/health/live", "/api/v1/protocols", "/nothing-here", "/problems/not-found", "/openapi/v1.json", "/api/" })
        {
            using var answer = await server.Anonymous.GetAsync(path);
            Assert.Equal("nosniff", Assert.Single(answer.Headers.GetValues("X-Content-Type-Options")));
            Assert.Contains("frame-ancestors 'none'", Assert.Single(answer.Headers.GetValues("Content-Security-Policy")), StringComparison.Ordinal);
            Assert.Equal("no-referrer", Assert.Single(answer.Headers.GetValues("Referrer-Policy")));
            Assert.False(answer.Headers.Contains("Server"));
        }
    }

    [Fact]
    public async Task OpenApi_ListsEveryRouteOfTheInterface()
    {
        var document = JsonNode.Parse(await server.Anonymous.GetStringAsync("/openapi/v1.json"))!;
        Assert.StartsWith("3.1", document["openapi"]!.GetValue<string>(), StringComparison.Ordinal);
        var paths = document["paths"]!.AsObject();
        var listed = paths.SelectMany(p => p.Value!.AsObject().Select(o => $"{o.Key.ToUpperInvariant()} {p.Key}")).Order().ToList();
        var routes = Routes.Where(r => r.RoutePattern.RawText!.StartsWith("/api/v1", StringComparison.Ordinal) || r.RoutePattern.RawText.StartsWith("/health", StringComparison.Ordinal))
            .SelectMany(r => MethodsOf(r).Select(m => $"{m} {Constraint().Replace(r.RoutePattern.RawText!, "}").TrimEnd('/')}")).Order().ToList();
        Assert.Equal(routes, listed);
        Assert.All(paths.SelectMany(p => p.Value!.AsObject()), o => Assert.NotNull(o.Value!["summary"]));
    }

    private static async Task<HttpStatusCode> SendAsync(HttpClient client, string method, RouteEndpoint route)
    {
        var path = "/" + Parameter().Replace(route.RoutePattern.RawText!, m => m.Groups[1].Value switch
        {
            var words when words.Contains("regex", StringComparison.Ordinal) => "protocols",
            var number when number.Contains(':') => "999999",
            _ => "nothing-of-that-name",
        }).TrimStart('/');
        using var request = new HttpRequestMessage(new HttpMethod(method), path);
        request.Headers.Add("Idempotency-Key", Guid.NewGuid().ToString());
        request.Headers.TryAddWithoutValidation("If-Match", "\"1\"");
        if (method is "POST" or "PUT" or "PATCH")
            request.Content = new StringContent(route.Metadata.GetMetadata<RequestExample>()?.Json ?? "{}", System.Text.Encoding.UTF8, "application/json");
        using var answer = await client.SendAsync(request);
        return answer.StatusCode;
    }

    /// <summary>The address as people write it, without the constraints of its parts.</summary>
    private static string Address(RouteEndpoint route) => "/" + Part().Replace(route.RoutePattern.RawText!, "{$1}").Trim('/');

    private static IReadOnlyList<string> MethodsOf(RouteEndpoint route) => route.Metadata.GetMetadata<IHttpMethodMetadata>()?.HttpMethods ?? ["GET"];

    [GeneratedRegex("(<!-- routes -->)\n.*?\n(<!-- /routes -->)", RegexOptions.Singleline)]
    private static partial Regex Table();

    [GeneratedRegex(@"\{([^}]+)\}")]
    private static partial Regex Parameter();

    [GeneratedRegex(@"\{(\w+)[^}]*\}")]
    private static partial Regex Part();

    [GeneratedRegex(@":[a-z]+\}")]
    private static partial Regex Constraint();
}
