using System.Net;
using System.Text.Json.Nodes;
using ProtoLedger.Testing.Servers;

namespace ProtoLedger.Server.Tests.Features;

/// <summary>Own tokens, and sessions that a browser's cookie carries.</summary>
public sealed class OwnAccountTests(ServerFixture server) : IClassFixture<ServerFixture>
{
    [Fact]
    public async Task Token_WithTheScopeToRead_ReadsButNeitherProposesNorKeepsTokens_UntilItIsEnded()
    {
        var owner = await server.AsAsync("tess");
        var made = await owner.CallAsync("POST", "/api/v1/tokens", new { label = "export", scopes = new[] { "read" }, days = 30 });
        Assert.Equal(HttpStatusCode.Created, made.Status);
        using var program = new HttpClient { BaseAddress = server.Anonymous.BaseAddress };
        program.DefaultRequestHeaders.Authorization = new("Bearer", made.Json["secret"]!.GetValue<string>());
        Assert.Equal(HttpStatusCode.OK, (await program.CallAsync("GET", "/api/v1/protocols")).Status);
        Assert.Equal(HttpStatusCode.Forbidden, (await program.CallAsync("GET", "/api/v1/tokens")).Status);
        Assert.Equal(HttpStatusCode.Forbidden, (await program.CallAsync("POST", "/api/v1/change-requests/1/submit", new { })).Status);

        var name = made.Json["token"]!["sha256"]!.GetValue<string>();
        Assert.DoesNotContain(made.Json["secret"]!.GetValue<string>(), (await owner.CallAsync("GET", "/api/v1/tokens")).Text, StringComparison.Ordinal);
        Assert.Equal(HttpStatusCode.NotFound, (await (await server.AsAsync("leo")).CallAsync("DELETE", "/api/v1/tokens/" + name)).Status);
        Assert.Equal(HttpStatusCode.NoContent, (await owner.CallAsync("DELETE", "/api/v1/tokens/" + name)).Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await program.CallAsync("GET", "/api/v1/protocols")).Status);
    }

    [Fact]
    public async Task SecondFactor_ConfirmedWithAWrongCode_IsRefusedAndNotKept()
    {
        var owner = await server.AsAsync("rada");
        var offer = await owner.CallAsync("POST", "/api/v1/session/second-factor", new { });
        var refused = await owner.CallAsync("PUT", "/api/v1/session/second-factor", new { secret = offer.Json["secret"]!.GetValue<string>(), code = "12345" });
        Assert.Equal(["/code"], refused.Pointers);
        Assert.Equal(HttpStatusCode.OK, (await server.Anonymous.CallAsync("POST", "/api/v1/session", new { name = "rada", password = ServerFixture.Password })).Status);
    }

    [Fact]
    public async Task SignOut_OfASessionThatACookieCarries_NeedsThePagesHeaderAndEndsIt()
    {
        var opened = await server.Anonymous.CallAsync("POST", "/api/v1/session", new { name = "rex", password = ServerFixture.Password });
        var cookie = "__Host-protoledger=" + opened.Json["token"]!.GetValue<string>();
        Assert.Equal(HttpStatusCode.Unauthorized, await SendAsync(HttpMethod.Delete, cookie, null));
        Assert.Equal(HttpStatusCode.OK, await SendAsync(HttpMethod.Get, cookie, null));
        Assert.Equal(HttpStatusCode.NoContent, await SendAsync(HttpMethod.Delete, cookie, "1"));
        Assert.Equal(HttpStatusCode.Unauthorized, await SendAsync(HttpMethod.Get, cookie, null));
    }

    [Fact]
    public async Task Body_WithANumberThatNoIntegerHolds_IsRefusedByPointer()
    {
        var refused = await (await server.AsAsync("tess")).CallAsync("POST", "/api/v1/tokens", JsonNode.Parse("""{"label":"a","scopes":["read"],"days":3000000000}"""));
        Assert.Equal((HttpStatusCode.BadRequest, "/days"), (refused.Status, Assert.Single(refused.Pointers)));
    }

    private async Task<HttpStatusCode> SendAsync(HttpMethod method, string cookie, string? fromPage)
    {
        using var client = new HttpClient(new HttpClientHandler { UseCookies = false }) { BaseAddress = server.Anonymous.BaseAddress };
        using var request = new HttpRequestMessage(method, "/api/v1/session");
        request.Headers.Add("Cookie", cookie);
        if (fromPage is not null)
            request.Headers.Add("X-Protoledger-Page", fromPage);
        using var answer = await client.SendAsync(request);
        return answer.StatusCode;
    }
}
