using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Server.Http;

/// <summary>From the outcome of a use case to an answer.</summary>
internal static class Answers
{
    /// <summary>200 with the value, or the problem.</summary>
    public static Results<Ok<TResponse>, Problem> ToOk<T, TResponse>(this Outcome<T> outcome, Func<T, TResponse> response) =>
        outcome.Succeeded ? TypedResults.Ok(response(outcome.Value)) : Problems.From(outcome.Refusal);

    /// <summary>200 with the value, or the problem.</summary>
    public static Results<Ok<T>, Problem> ToOk<T>(this Outcome<T> outcome) => outcome.ToOk(value => value);
}
