using System.Reflection;
using Markdig;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documentation;

/// <summary>The pages of docs/problems, to which the type of every problem points.</summary>
internal static class ProblemPages
{
    private const string Folder = "problems/";

    /// <summary>Names of the pages.</summary>
    public static IReadOnlyList<string> Names { get; } =
    [
        .. Assembly.GetExecutingAssembly().GetManifestResourceNames()
            .Where(name => name.StartsWith(Folder, StringComparison.Ordinal))
            .Select(name => name[Folder.Length..]).Order(StringComparer.Ordinal),
    ];

    internal static IEndpointRouteBuilder MapProblemPages(this IEndpointRouteBuilder routes)
    {
        routes.MapGet("/problems/{name}", Show).Needs(RoleRule.Anyone).ExcludeFromDescription();
        return routes;
    }

    private static IResult Show(string name)
    {
        if (!Names.Contains(name))
            return Problems.Of(Problems.Missing, "There is no such type of problem.");
        using var stream = Assembly.GetExecutingAssembly().GetManifestResourceStream(Folder + name)!;
        using var reader = new StreamReader(stream);
        var body = Markdown.ToHtml(reader.ReadToEnd());
        return TypedResults.Content(
            $"<!doctype html><html lang=\"en\"><meta charset=\"utf-8\"><title>{name} - ProtoLedger</title><link rel=\"stylesheet\" href=\"/static/plain.css\"><main>{body}</main></html>",
            "text/html; charset=utf-8");
    }
}
