using System.Text.Json.Nodes;
using Microsoft.AspNetCore.OpenApi;
using Microsoft.OpenApi;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;
using Scalar.AspNetCore;

namespace ProtoLedger.Server.Features.Documentation;

/// <summary>The OpenAPI document and the page to browse it.</summary>
internal static class ApiDescription
{
    private const string Bearer = "bearer";

    internal static IServiceCollection AddApiDescription(this IServiceCollection services) =>
        services.AddOpenApi("v1", options =>
        {
            options.OpenApiVersion = OpenApiSpecVersion.OpenApi3_1;
            options.AddDocumentTransformer(DescribeDocumentAsync);
            options.AddOperationTransformer(DescribeOperationAsync);
        });

    internal static IEndpointRouteBuilder MapApiDescription(this IEndpointRouteBuilder routes)
    {
        routes.MapOpenApi("/openapi/{documentName}.json").Needs(RoleRule.Anyone);
        routes.MapScalarApiReference("/api", options => options
                .WithTitle("ProtoLedger API")
                .DisableDefaultFonts()
                .DisableAgent()
                .DisableMcp()
                .DisableTelemetry()
                .WithOpenApiRoutePattern("/openapi/v1.json"))
            .Needs(RoleRule.Anyone)
            // The page starts itself with an inline script and styles its parts inline; it loads nothing from elsewhere.
            .WithMetadata(new ContentPolicy(
                "default-src 'none'; script-src 'self' 'unsafe-inline'; style-src 'self' 'unsafe-inline'; img-src 'self' data:; font-src 'self' data:; connect-src 'self'; base-uri 'none'; frame-ancestors 'none'"));
        return routes;
    }

    private static Task DescribeDocumentAsync(OpenApiDocument document, OpenApiDocumentTransformerContext context, CancellationToken cancellationToken)
    {
        document.Info = new OpenApiInfo
        {
            Title = "ProtoLedger",
            Version = "v1",
            Description = "Versions, predictions, regression runs, reports, signatures and the ledger of MR scan protocols. Predictions come from models and published tissue values; they are no measurement and no diagnosis.",
        };
        document.Servers = [new OpenApiServer { Url = "/" }];
        document.Components ??= new OpenApiComponents();
        document.Components.SecuritySchemes ??= new Dictionary<string, IOpenApiSecurityScheme>();
        document.Components.SecuritySchemes[Bearer] = new OpenApiSecurityScheme
        {
            Type = SecuritySchemeType.Http,
            Scheme = "bearer",
            Description = "The token of POST /api/v1/session, or an API token.",
        };
        return Task.CompletedTask;
    }

    private static Task DescribeOperationAsync(OpenApiOperation operation, OpenApiOperationTransformerContext context, CancellationToken cancellationToken)
    {
        var metadata = context.Description.ActionDescriptor.EndpointMetadata;
        var rule = metadata.OfType<RoleRule>().LastOrDefault();
        operation.Responses ??= [];
        var refusals = metadata.OfType<RefusalMetadata>().Select(m => m.Type).ToList();
        if (rule is { AllowsAnonymous: false })
        {
            operation.Security = [new OpenApiSecurityRequirement { [new OpenApiSecuritySchemeReference(Bearer, context.Document)] = [] }];
            refusals.AddRange([Problems.SignInNeeded, Problems.NotAllowed]);
        }

        refusals.AddRange([Problems.Internal, Problems.DatabaseAway]);
        operation.Description = string.Join("\n\n", new[] { operation.Description, rule is null ? null : $"Rule: {rule.Name}." }.Where(t => !string.IsNullOrEmpty(t)));
        foreach (var group in refusals.Distinct().GroupBy(t => t.Status).OrderBy(g => g.Key))
            operation.Responses[$"{group.Key}"] = Refusal(group);
        operation.Parameters ??= [];
        if (metadata.OfType<IdempotencyKeyNeeded>().Any())
            operation.Parameters.Add(Header("Idempotency-Key", "Names the request, so that a repetition has no second effect.", "6f0c1f6e-3c55-4a53-9d5b-0b4f3e1f5a10"));
        if (metadata.OfType<IfMatchNeeded>().Any())
            operation.Parameters.Add(Header("If-Match", "ETag of the state that was read.", "\"1\""));
        if (metadata.OfType<RequestExample>().FirstOrDefault() is { } example && operation.RequestBody?.Content is { } content)
            foreach (var media in content.Values)
                ((OpenApiMediaType)media).Example = JsonNode.Parse(example.Json);
        return Task.CompletedTask;
    }

    private static OpenApiParameter Header(string name, string description, string example) => new()
    {
        Name = name,
        In = ParameterLocation.Header,
        Required = true,
        Description = description,
        Schema = new OpenApiSchema { Type = JsonSchemaType.String },
        Example = JsonValue.Create(example),
    };

    private static OpenApiResponse Refusal(IEnumerable<ProblemType> types)
    {
        var list = types.ToList();
        return new OpenApiResponse
        {
            Description = string.Join("; ", list.Select(t => $"{t.Title} ({t.Uri})")),
            Content = new Dictionary<string, OpenApiMediaType>
            {
                ["application/problem+json"] = new()
                {
                    Example = new JsonObject { ["type"] = list[0].Uri, ["title"] = list[0].Title, ["status"] = list[0].Status, ["detail"] = "What happened, with the values.", ["traceId"] = "0af7651916cd43dd8448eb211c80319c" },
                },
            },
        };
    }
}
