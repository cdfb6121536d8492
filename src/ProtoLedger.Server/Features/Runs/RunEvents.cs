using System.Globalization;
using System.Net.ServerSentEvents;
using System.Runtime.CompilerServices;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Runs;

/// <summary>Progress of a run as server-sent events: <c>progress</c> while it lasts, <c>ended</c> once. A reader that comes back says the last event it saw and misses nothing that counts.</summary>
internal static class RunEvents
{
    private static readonly TimeSpan Pause = TimeSpan.FromMilliseconds(400);

    internal static IEndpointRouteBuilder MapRunEvents(this IEndpointRouteBuilder routes)
    {
        routes.MapGet("/api/v1/runs/{id:long}/events", StreamAsync).WithName("FollowRun").WithTags("Regression runs")
            .WithSummary("Progress of a run as server-sent events").Needs(ReadRuns.Rule).Refuses(Problems.Missing);
        return routes;
    }

    private static async Task<IResult> StreamAsync(HttpContext context, Caller caller, ReadRuns useCase, long id, CancellationToken cancellationToken)
    {
        var found = await useCase.GetAsync(caller, id, cancellationToken);
        if (!found.Succeeded)
            return Problems.From(found.Refusal);
        var seen = int.TryParse(context.Request.Headers["Last-Event-ID"], NumberStyles.None, CultureInfo.InvariantCulture, out var last) ? last : -1;
        return TypedResults.ServerSentEvents(FollowAsync(caller, useCase, id, seen, cancellationToken));
    }

    private static async IAsyncEnumerable<SseItem<RunProgress>> FollowAsync(
        Caller caller, ReadRuns useCase, long id, int seen, [EnumeratorCancellation] CancellationToken cancellationToken)
    {
        while (!cancellationToken.IsCancellationRequested)
        {
            // The state first: progress read after the end is the whole.
            var run = await useCase.GetAsync(caller, id, cancellationToken);
            var progress = await useCase.ProgressAsync(caller, id, cancellationToken);
            if (!run.Succeeded || !progress.Succeeded)
                yield break;
            var name = progress.Value.Done.ToString(CultureInfo.InvariantCulture);
            if (run.Value.FinishedAt is not null)
            {
                yield return new SseItem<RunProgress>(progress.Value, "ended") { EventId = name };
                yield break;
            }

            if (progress.Value.Done > seen)
            {
                seen = progress.Value.Done;
                yield return new SseItem<RunProgress>(progress.Value, "progress") { EventId = name };
            }

            await Task.Delay(Pause, cancellationToken);
        }
    }
}
