using Microsoft.AspNetCore.Diagnostics;
using Npgsql;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Server.Http;

/// <summary>Turns exceptions into problems; the text of an unknown exception goes to the log alone.</summary>
internal sealed class ProblemExceptionHandler(ILogger<ProblemExceptionHandler> logger) : IExceptionHandler
{
    public async ValueTask<bool> TryHandleAsync(HttpContext httpContext, Exception exception, CancellationToken cancellationToken)
    {
        if (exception is OperationCanceledException && httpContext.RequestAborted.IsCancellationRequested)
        {
            httpContext.Response.StatusCode = StatusCodes.Status499ClientClosedRequest;
            return true;
        }

        var problem = exception switch
        {
            ProblemException known => known.Problem,
            BadHttpRequestException bad => Problems.ForStatus(bad.StatusCode, httpContext.Request.Path),
            StoreUnavailableException => Problems.DatabaseIsAway(),
            NpgsqlException { IsTransient: true } => Problems.DatabaseIsAway(),
            PostgresException { SqlState: [ '5', '7' or '3', ..] } => Problems.DatabaseIsAway(),
            // Only an address can still carry such a text; bodies are read strictly.
            PostgresException { SqlState: PostgresErrorCodes.CharacterNotInRepertoire } => Problems.Malformed("The address holds a character that cannot be stored, such as NUL."),
            PostgresException => null,
            NpgsqlException => Problems.DatabaseIsAway(),
            _ => null,
        };
        if (problem is null)
        {
            logger.LogError(exception, "{Method} {Path} failed", httpContext.Request.Method, httpContext.Request.Path.ToString().ReplaceLineEndings(" "));
            problem = Problems.ForStatus(500, httpContext.Request.Path);
        }

        await problem.ExecuteAsync(httpContext);
        return true;
    }
}
