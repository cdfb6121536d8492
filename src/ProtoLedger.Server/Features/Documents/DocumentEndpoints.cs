using System.Text.Json;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>Stored versions of the five kinds of document, each kind under its own name, and what was effective when.</summary>
internal static class DocumentEndpoints
{
    internal static IEndpointRouteBuilder MapDocuments(this IEndpointRouteBuilder routes)
    {
        foreach (var (folder, kind) in Folders.All)
            MapKind(routes, folder, kind);
        routes.MapGet("/api/v1/effective", EffectiveAsync).WithName("GetEffective").WithTags("Answers")
            .WithSummary("What was effective on a scanner at a time; now where no time is given")
            .Needs(ReadDocuments.Rule).Refuses(Problems.MalformedRequest, Problems.Missing);
        return routes;
    }

    private static void MapKind(IEndpointRouteBuilder routes, string folder, DocumentKind kind)
    {
        var group = routes.MapGroup("/api/v1/" + folder).WithTags(char.ToUpperInvariant(folder[0]) + folder[1..]).Needs(ReadDocuments.Rule);
        var name = kind.ToString();
        group.MapGet("", (HttpContext context, Caller caller, ReadDocuments useCase, string? after, string? limit, CancellationToken cancellationToken) =>
                ListAsync(context, caller, useCase, kind, after, limit, cancellationToken))
            .WithName($"List{name}").WithSummary("Newest version of each, by identifier").Refuses(Problems.MalformedRequest);
        group.MapGet("/{id}/versions", (Caller caller, ReadDocuments useCase, string id, CancellationToken cancellationToken) =>
                VersionsAsync(caller, useCase, new DocumentKey(kind, id), cancellationToken))
            .WithName($"List{name}Versions").WithSummary("All versions, oldest first").Refuses(Problems.Missing);
        group.MapGet("/{id}", (HttpContext context, Caller caller, ReadDocuments useCase, string id, string? format, CancellationToken cancellationToken) =>
                VersionAsync(context, caller, useCase, new DocumentKey(kind, id), null, format, cancellationToken))
            .WithName($"Get{name}").WithSummary("The newest version with its document; format=yaml gives the document alone, format=canonical its bytes as they are hashed and signed")
            .Produces<VersionResponse>().Refuses(Problems.MalformedRequest, Problems.Missing);
        group.MapGet("/{id}/versions/{version:int}", (HttpContext context, Caller caller, ReadDocuments useCase, string id, int version, string? format, CancellationToken cancellationToken) =>
                VersionAsync(context, caller, useCase, new DocumentKey(kind, id), version, format, cancellationToken))
            .WithName($"Get{name}Version").WithSummary("A version with its document; format=yaml gives the document alone, format=canonical its bytes as they are hashed and signed")
            .Produces<VersionResponse>().Refuses(Problems.MalformedRequest, Problems.Missing);
        group.MapGet("/{id}/versions/{version:int}/provenance", (Caller caller, ReadDocuments useCase, string id, int version, string? pointer, CancellationToken cancellationToken) =>
                ProvenanceAsync(caller, useCase, new DocumentKey(kind, id), version, pointer, cancellationToken))
            .WithName($"Get{name}Provenance").WithSummary("Who set a parameter, when and why, newest first")
            .Refuses(Problems.MalformedRequest, Problems.Missing, Problems.InvalidContent);
        group.MapGet("/{id}/versions/{from:int}/compare/{to:int}", (Caller caller, ReadDocuments useCase, string id, int from, int to, CancellationToken cancellationToken) =>
                CompareAsync(caller, useCase, new DocumentKey(kind, id), from, to, cancellationToken))
            .WithName($"Compare{name}Versions").WithSummary("Every difference between two versions").Refuses(Problems.Missing);
    }

    private static async Task<Results<Ok<PageResponse<DocumentSummary>>, Problem>> ListAsync(
        HttpContext context, Caller caller, ReadDocuments useCase, DocumentKind kind, string? after, string? limit, CancellationToken cancellationToken)
    {
        var query = new Query();
        var most = (int)(query.Number("limit", limit, 1, Paging.MostItems) ?? Paging.UsualItems);
        query.Demand();
        var page = await useCase.ListAsync(caller, kind, after, most, cancellationToken);
        if (page.Succeeded && page.Value.Count == most)
            Paging.AddNext(context, "after", page.Value[^1].Id);
        return page.ToOk(items => new PageResponse<DocumentSummary>(items));
    }

    private static async Task<Results<Ok<PageResponse<VersionSummary>>, Problem>> VersionsAsync(
        Caller caller, ReadDocuments useCase, DocumentKey key, CancellationToken cancellationToken) =>
        (await useCase.VersionsAsync(caller, key, cancellationToken)).ToOk(items => new PageResponse<VersionSummary>(items));

    private static async Task<IResult> VersionAsync(
        HttpContext context, Caller caller, ReadDocuments useCase, DocumentKey key, int? version, string? format, CancellationToken cancellationToken)
    {
        var query = new Query();
        var form = query.OneOf("format", format, ["json", "yaml", "canonical"], word => (DocumentForm?)Enum.Parse<DocumentForm>(word, ignoreCase: true));
        query.Demand();
        var found = await useCase.VersionAsync(caller, key, version, cancellationToken);
        if (!found.Succeeded)
            return Problems.From(found.Refusal);
        context.Response.Headers.ETag = $"\"{found.Value.Summary.Sha256}\"";
        return form switch
        {
            DocumentForm.Yaml => TypedResults.Text(YamlExport.Write(found.Value.Bytes), "application/yaml; charset=utf-8"),
            DocumentForm.Canonical => TypedResults.Bytes(found.Value.Bytes, "application/json"),
            _ => TypedResults.Ok(new VersionResponse(found.Value.Summary, JsonElement.Parse(found.Value.Bytes))),
        };
    }

    private static async Task<Results<Ok<ParameterProvenance>, Problem>> ProvenanceAsync(
        Caller caller, ReadDocuments useCase, DocumentKey key, int version, string? pointer, CancellationToken cancellationToken)
    {
        var query = new Query();
        var place = query.RequiredText("pointer", pointer);
        query.Demand();
        return (await useCase.ProvenanceAsync(caller, key, version, place, cancellationToken)).ToOk();
    }

    private static async Task<Results<Ok<PageResponse<ParameterChange>>, Problem>> CompareAsync(
        Caller caller, ReadDocuments useCase, DocumentKey key, int from, int to, CancellationToken cancellationToken) =>
        (await useCase.CompareAsync(caller, key, from, to, cancellationToken)).ToOk(changes => new PageResponse<ParameterChange>(changes));

    private static async Task<Results<Ok<EffectiveAnswer>, Problem>> EffectiveAsync(
        Caller caller, ReadDocuments useCase, string? protocol, string? scanner, string? at, CancellationToken cancellationToken)
    {
        var query = new Query();
        var time = query.Time("at", at);
        query.Demand();
        return (await useCase.EffectiveAsync(caller, protocol, scanner, time, cancellationToken)).ToOk();
    }
}

/// <summary>How a version is returned: with what is known about it, as YAML, or as the bytes that were hashed.</summary>
internal enum DocumentForm
{
    Json,
    Yaml,
    Canonical,
}

/// <summary>A version with its document.</summary>
/// <param name="Version">What is known about it.</param>
/// <param name="Document">The document.</param>
internal sealed record VersionResponse(VersionSummary Version, JsonElement Document);
