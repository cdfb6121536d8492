using System.Text.Encodings.Web;
using Microsoft.AspNetCore.WebUtilities;

namespace ProtoLedger.Server.Http;

/// <summary>A page of one message, for addresses that cannot show their own: nothing there, not allowed, failed.</summary>
internal static class MessagePage
{
    /// <summary>True when a person waits for the answer: a page, or an unknown address asked for by a browser.</summary>
    public static bool Fits(HttpContext context) =>
        context.GetEndpoint()?.Metadata.GetMetadata<PageRoute>() is not null
        || (!context.Request.Path.StartsWithSegments("/api") && context.Request.Headers.Accept.ToString().Contains("text/html", StringComparison.Ordinal));

    public static Task WriteAsync(HttpContext context)
    {
        var status = context.Response.StatusCode;
        var detail = context.Features.Get<RefusalShown>()?.Refusal.Detail ?? status switch
        {
            StatusCodes.Status400BadRequest => "The form was too old or incomplete. Go back, load the page again, and send it once more: nothing was changed.",
            StatusCodes.Status403Forbidden => "Your roles do not allow this page. Ask an administrator if they should.",
            StatusCodes.Status404NotFound => "There is nothing at this address. Look for the protocol by its name instead.",
            _ => "The server could not answer. Nothing was changed; try again in a moment.",
        };
        var title = status switch
        {
            StatusCodes.Status403Forbidden => "Not allowed",
            StatusCodes.Status404NotFound => "Nothing here",
            _ => ReasonPhrases.GetReasonPhrase(status),
        };
        context.Response.ContentType = "text/html; charset=utf-8";
        return context.Response.WriteAsync(
            $"""
            <!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>{title} - ProtoLedger</title>
            <link rel="stylesheet" href="/static/report.css"><link rel="stylesheet" href="/static/site.css"></head>
            <body><main id="content"><div class="gate"><h1>{title}</h1><p>{HtmlEncoder.Default.Encode(detail)}</p><p><a href="/">To the first page</a></p></div></main></body></html>
            """,
            context.RequestAborted);
    }
}
