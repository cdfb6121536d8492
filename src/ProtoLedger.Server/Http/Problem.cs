using System.Diagnostics;
using System.Globalization;
using Microsoft.AspNetCore.Mvc;
using Microsoft.Net.Http.Headers;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Server.Http;

/// <summary>A problem on its way to the caller; made by <see cref="Problems"/> alone.</summary>
internal sealed class Problem(ProblemType type, string detail) : IResult
{
    private readonly Dictionary<string, string> headers = [];
    private readonly Dictionary<string, object?> extensions = [];

    public ProblemType Type { get; } = type;

    public string Detail { get; } = detail;

    public Problem With(string name, object? value)
    {
        extensions[name] = value;
        return this;
    }

    public Problem WithHeader(string name, string value)
    {
        headers[name] = value;
        return this;
    }

    public Problem WithRetryAfter(TimeSpan wait) =>
        WithHeader(HeaderNames.RetryAfter, Math.Max(1, Math.Ceiling(wait.TotalSeconds)).ToString(CultureInfo.InvariantCulture));

    public Problem WithErrors(IReadOnlyList<FieldError> errors) => errors.Count == 0 ? this : With("errors", errors);

    public Task ExecuteAsync(HttpContext httpContext)
    {
        foreach (var (name, value) in headers)
            httpContext.Response.Headers[name] = value;
        httpContext.Response.StatusCode = Type.Status;
        var problem = new ProblemDetails { Type = Type.Uri, Title = Type.Title, Status = Type.Status, Detail = Detail, Instance = httpContext.Request.Path };
        foreach (var (name, value) in extensions)
            problem.Extensions[name] = value;
        problem.Extensions["traceId"] = Activity.Current?.TraceId.ToString() ?? httpContext.TraceIdentifier;
        return httpContext.Response.WriteAsJsonAsync(problem, options: null, contentType: "application/problem+json", httpContext.RequestAborted);
    }
}
