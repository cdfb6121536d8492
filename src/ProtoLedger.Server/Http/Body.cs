using System.Text.Json;
using System.Text.Json.Nodes;
using Microsoft.AspNetCore.Http.Json;
using Microsoft.Extensions.Options;
using Microsoft.Net.Http.Headers;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Server.Http;

/// <summary>A JSON body that was read strictly: no duplicate or unknown members, no NUL, no unpaired surrogate, everything in range.</summary>
/// <typeparam name="T">Record of the body.</typeparam>
/// <param name="Value">The content.</param>
internal readonly record struct Body<T>(T Value)
{
    /// <summary>Reads the body; called by the platform.</summary>
    /// <exception cref="ProblemException">The body is not what is asked for; every fault is named with its JSON pointer.</exception>
    public static async ValueTask<Body<T>> BindAsync(HttpContext context)
    {
        var options = context.RequestServices.GetRequiredService<IOptions<JsonOptions>>().Value.SerializerOptions;
        if (await ReadAsync(context.Request) is not { } tree)
            throw new ProblemException(Problems.Malformed("The body is null; an object is needed."));
        var errors = JsonShape.Check(tree, options.GetTypeInfo(typeof(T)), options);
        if (errors.Count > 0)
            throw new ProblemException(Problems.Malformed($"{errors.Count} field(s) of the body do not have the shape asked for.", errors));
        try
        {
            return new Body<T>(tree.Deserialize<T>(options)!);
        }
        catch (JsonException fault)
        {
            throw new ProblemException(Problems.Malformed($"The body cannot be read at {fault.Path}: {fault.Message}"));
        }
    }

    private static async Task<JsonNode?> ReadAsync(HttpRequest request)
    {
        using var bytes = new MemoryStream();
        await request.Body.CopyToAsync(bytes, request.HttpContext.RequestAborted);
        if (bytes.Length == 0)
            return new JsonObject(); // no body says as much as an empty one
        if (!MediaTypeHeaderValue.TryParse(request.ContentType, out var type) || !(type.MediaType == "application/json" || type.Suffix == "json"))
            throw new ProblemException(Problems.ForStatus(StatusCodes.Status415UnsupportedMediaType, request.Path));
        if (bytes.Length > CanonicalJson.MaximumBytes)
            throw new ProblemException(Problems.ForStatus(StatusCodes.Status413PayloadTooLarge, request.Path));
        try
        {
            return CanonicalJson.Parse(bytes.GetBuffer().AsSpan(0, (int)bytes.Length));
        }
        catch (CanonicalJsonException fault)
        {
            throw new ProblemException(Problems.Malformed(
                "The body is not JSON as it is taken here.", new Application.Outcomes.FieldError(fault.Pointer, null, "RFC 8259, unique keys, finite numbers", fault.Detail)));
        }
    }
}
