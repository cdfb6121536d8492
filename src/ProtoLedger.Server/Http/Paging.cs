using Microsoft.AspNetCore.Http.Extensions;
using Microsoft.AspNetCore.WebUtilities;

namespace ProtoLedger.Server.Http;

/// <summary>Pages that continue after a key (RFC 8288 links), never after a count.</summary>
internal static class Paging
{
    public const int UsualItems = 50;

    public const int MostItems = 200;

    /// <summary>Adds the link to the page that begins after a key.</summary>
    public static void AddNext(HttpContext context, string parameter, string key)
    {
        var query = QueryHelpers.ParseQuery(context.Request.QueryString.Value);
        query[parameter] = key;
        context.Response.Headers.Append("Link", $"<{context.Request.PathBase}{context.Request.Path}{new QueryBuilder(query).ToQueryString()}>; rel=\"next\"");
    }
}
