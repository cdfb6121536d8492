using System.Globalization;
using System.Text.Json.Nodes;
using Microsoft.AspNetCore.Html;
using ProtoLedger.Application.ChangeRequests;

namespace ProtoLedger.Server.Features.Shared;

/// <summary>Small pieces that pages repeat: times, states, hashes.</summary>
internal static class Show
{
    /// <summary>A time in UTC; the page's script rewrites it in the reader's zone.</summary>
    public static IHtmlContent Time(DateTime utc) =>
        new HtmlString(string.Create(CultureInfo.InvariantCulture, $"<time datetime=\"{utc:yyyy-MM-ddTHH:mm:ssZ}\">{utc:yyyy-MM-dd HH:mm} UTC</time>"));

    /// <summary>A day in UTC.</summary>
    public static IHtmlContent Day(DateTime utc) =>
        new HtmlString(string.Create(CultureInfo.InvariantCulture, $"<time datetime=\"{utc:yyyy-MM-ddTHH:mm:ssZ}\" data-day>{utc:yyyy-MM-dd}</time>"));

    /// <summary>A state as shape and word.</summary>
    public static IHtmlContent State(ChangeRequestState state)
    {
        var mark = state switch
        {
            ChangeRequestState.Draft => "□",
            ChangeRequestState.UnderReview => "◐",
            ChangeRequestState.Approved => "■",
            ChangeRequestState.Declined => "✕",
            _ => "–",
        };
        var word = state.ToWord();
        return new HtmlString($"<span class=\"state {word.Replace(' ', '-')}\"><span aria-hidden=\"true\">{mark}</span> {word}</span>");
    }

    /// <summary>A value of a document as text.</summary>
    public static string Value(JsonNode? value) =>
        value is null ? "" : value is JsonValue single && single.TryGetValue<string>(out var text) ? text : value.ToJsonString();

    /// <summary>With a capital at the start, unless it is a keyword or a symbol such as pH.</summary>
    public static string Sentence(string text) =>
        text.Length > 1 && char.IsLower(text[0]) && !char.IsUpper(text[1]) ? char.ToUpperInvariant(text[0]) + text[1..] : text;

    /// <summary>First twelve digits of a hash.</summary>
    public static string Short(string sha256) => sha256[..12];
}
