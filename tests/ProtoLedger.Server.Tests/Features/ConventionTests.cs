using System.Net;
using System.Text.Json.Nodes;
using ProtoLedger.Testing.Servers;

namespace ProtoLedger.Server.Tests.Features;

/// <summary>Entity tags (RFC 9110, RFC 6585), idempotency keys, pages (RFC 8288), problems (RFC 9457).</summary>
public sealed class ConventionTests(StoreServerFixture server) : IClassFixture<StoreServerFixture>
{
    private const string Proposals = "/api/v1/change-requests";

    [Fact]
    public async Task Post_WithoutIdempotencyKey_IsRefused()
    {
        var client = await server.AsAsync("tess");
        var answer = await client.CallAsync("POST", Proposals, await client.ProposalAsync("liver"), key: "");
        Assert.Equal((HttpStatusCode.BadRequest, "idempotency-key-missing"), (answer.Status, answer.Problem));
    }

    [Fact]
    public async Task Post_RepeatedWithItsKey_HasOneEffectAndTheSameAnswer()
    {
        var client = await server.AsAsync("tess");
        var proposal = await client.ProposalAsync("knee", Renamed);
        var first = await client.CallAsync("POST", Proposals, proposal, key: "knee-1");
        var second = await client.CallAsync("POST", Proposals, proposal, key: "knee-1");
        Assert.Equal(HttpStatusCode.Created, first.Status);
        Assert.Equal(first.Text, second.Text);
        Assert.Equal(first.Tag, second.Tag);
    }

    [Fact]
    public async Task Post_SameKeyOtherBody_IsRefused()
    {
        var client = await server.AsAsync("tess");
        var proposal = await client.ProposalAsync("heart", Renamed);
        Assert.Equal(HttpStatusCode.Created, (await client.CallAsync("POST", Proposals, proposal, key: "heart-1")).Status);
        proposal["reason"] = "Another reason";
        var answer = await client.CallAsync("POST", Proposals, proposal, key: "heart-1");
        Assert.Equal((HttpStatusCode.UnprocessableEntity, "idempotency-key-reused"), (answer.Status, answer.Problem));
    }

    [Fact]
    public async Task Post_SameKeyOfAnotherPerson_IsAnotherRequest()
    {
        var (tess, leo) = (await server.AsAsync("tess"), await server.AsAsync("leo"));
        var first = await tess.CallAsync("POST", Proposals, await tess.ProposalAsync("shoulder", Renamed), key: "shared-key");
        var second = await leo.CallAsync("POST", Proposals, await leo.ProposalAsync("prostate", Renamed), key: "shared-key");
        Assert.Equal((HttpStatusCode.Created, HttpStatusCode.Created), (first.Status, second.Status));
    }

    [Fact]
    public async Task Post_SixteenAtOnceWithOneKey_HaveOneEffect()
    {
        var client = await server.AsAsync("tess");
        var proposal = await client.ProposalAsync("pituitary", Renamed);
        var answers = await Task.WhenAll(Enumerable.Range(0, 16).Select(_ => client.CallAsync("POST", Proposals, proposal, key: "race")));
        Assert.All(answers, a => Assert.True(a.Status == HttpStatusCode.Created || a.Problem == "request-in-flight", a.Text));
        var made = Assert.Single(answers.Where(a => a.Status == HttpStatusCode.Created).Select(a => a.Json["id"]!.GetValue<long>()).Distinct());
        Assert.Equal(HttpStatusCode.OK, (await client.CallAsync("GET", $"{Proposals}/{made}")).Status);
    }

    [Fact]
    public async Task Step_WithoutIfMatch_Is428AndStaleIs412WithThePresentTag()
    {
        var client = await server.AsAsync("tess");
        var made = await client.CallAsync("POST", Proposals, await client.ProposalAsync("orbit", Renamed));
        var submit = $"{Proposals}/{made.Json["id"]}/submit";
        var missing = await client.CallAsync("POST", submit);
        var any = await client.CallAsync("POST", submit, ifMatch: "*");
        var weak = await client.CallAsync("POST", submit, ifMatch: "W/" + made.Tag);
        var stale = await client.CallAsync("POST", submit, ifMatch: "\"99\"");
        Assert.Equal((HttpStatusCode.PreconditionRequired, "precondition-missing"), (missing.Status, missing.Problem));
        Assert.Equal(HttpStatusCode.PreconditionRequired, any.Status);
        Assert.Equal(HttpStatusCode.PreconditionFailed, weak.Status);
        Assert.Equal((HttpStatusCode.PreconditionFailed, made.Tag), (stale.Status, stale.Tag));
    }

    [Fact]
    public async Task Edit_ByThirtyTwoAtOnce_SucceedsOnce()
    {
        var client = await server.AsAsync("tess");
        var proposal = await client.ProposalAsync("lumbar-spine", Renamed);
        var made = await client.CallAsync("POST", Proposals, proposal);
        var body = new JsonObject { ["document"] = proposal["document"]!.DeepClone() };
        var answers = await Task.WhenAll(Enumerable.Range(0, 32).Select(_ => client.CallAsync("PUT", $"{Proposals}/{made.Json["id"]}", body, ifMatch: made.Tag)));
        Assert.Single(answers, a => a.Status == HttpStatusCode.OK);
        Assert.Equal(31, answers.Count(a => a.Status == HttpStatusCode.PreconditionFailed));
    }

    [Fact]
    public async Task Propose_OnAnOldVersion_NamesTheNewest()
    {
        var client = await server.AsAsync("tess");
        var proposal = await client.ProposalAsync("brain-lesion", Renamed);
        var newest = proposal["baseVersion"]!.GetValue<int>();
        proposal["baseVersion"] = newest - 1;
        var answer = await client.CallAsync("POST", Proposals, proposal);
        Assert.Equal((HttpStatusCode.Conflict, "base-moved"), (answer.Status, answer.Problem));
        Assert.Equal(newest, answer.Json["newestVersion"]!.GetValue<int>());
    }

    [Fact]
    public async Task Pages_FollowedByTheirLinks_ListEverythingOnce()
    {
        var client = await server.AsAsync("rex");
        var all = (await client.CallAsync("GET", "/api/v1/protocols?limit=200")).Json["items"]!.AsArray().Select(i => i!["id"]!.GetValue<string>()).ToList();
        var paged = new List<string>();
        for (var next = "/api/v1/protocols?limit=5"; next is not null;)
        {
            var page = await client.CallAsync("GET", next);
            paged.AddRange(page.Json["items"]!.AsArray().Select(i => i!["id"]!.GetValue<string>()));
            next = page.Headers.TryGetValues("Link", out var links) ? links.Single().Split('<', '>')[1] : null;
        }

        Assert.True(all.Count > 10);
        Assert.Equal(all, paged);
    }

    [Fact]
    public async Task Effective_BeforeAndAfter_AnswersByTime()
    {
        var client = await server.AsAsync("rex");
        var versions = (await client.CallAsync("GET", "/api/v1/protocols/brain-standard/versions")).Json["items"]!.AsArray();
        var second = versions.Single(v => v!["version"]!.GetValue<int>() == 2)!["effective"]![0]!;
        var (scanner, from) = (second["scanner"]!.GetValue<string>(), second["from"]!.GetValue<string>());
        var at = await client.CallAsync("GET", $"/api/v1/effective?protocol=brain-standard&scanner={scanner}&at={from}");
        var early = await client.CallAsync("GET", "/api/v1/effective?protocol=brain-standard&at=1990-01-01T00:00:00Z");
        Assert.Equal(2, at.Json["versions"]![0]!["version"]!["version"]!.GetValue<int>());
        Assert.Empty(early.Json["versions"]!.AsArray());
        Assert.Contains("No record", early.Json["gap"]!.GetValue<string>(), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Yaml_OfAVersion_EqualsItsFileInTheStore()
    {
        var client = await server.AsAsync("rex");
        var yaml = (await client.CallAsync("GET", "/api/v1/protocols/brain-standard/versions/3?format=yaml")).Text;
        Assert.Equal(await File.ReadAllTextAsync(Path.Combine(StoreServerFixture.Store, "protocols", "brain-standard", "v0003.yaml")), yaml);
    }

    [Theory]
    [InlineData("DELETE", "/api/v1/protocols", "GET")]
    [InlineData("PUT", "/api/v1/change-requests", "GET, POST")]
    public async Task Method_ThatIsNotThere_Is405WithAllow(string method, string path, string allow)
    {
        var answer = await (await server.AsAsync("tess")).CallAsync(method, path);
        Assert.Equal((HttpStatusCode.MethodNotAllowed, "method-not-allowed"), (answer.Status, answer.Problem));
        Assert.Equal(allow, string.Join(", ", answer.ContentHeaders.Allow.Order()));
    }

    [Fact]
    public async Task Token_ThatIsUnknownOrEnded_Is401WithTheScheme()
    {
        var session = await server.SignInAsync("rex");
        Assert.Equal(HttpStatusCode.OK, (await session.CallAsync("GET", "/api/v1/session")).Status);
        Assert.Equal(HttpStatusCode.NoContent, (await session.CallAsync("DELETE", "/api/v1/session")).Status);
        var ended = await session.CallAsync("GET", "/api/v1/session");
        Assert.Equal(HttpStatusCode.Unauthorized, ended.Status);
        Assert.Equal("Bearer", ended.Headers.WwwAuthenticate.ToString());
        Assert.Equal(HttpStatusCode.Unauthorized, (await server.Anonymous.CallAsync("POST", "/api/v1/session", new { name = "rex", password = "wrong horse battery" })).Status);
    }

    private static void Renamed(JsonObject document) => document["title"] = document["title"] + ", renamed";
}
