using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Server.Http;

internal sealed class NobodyIsKnown : IIdentification
{
    public Task<Outcome<Actor>> IdentifyAsync(string token, CancellationToken cancellationToken) =>
        Task.FromResult<Outcome<Actor>>(new Unauthenticated("The token is not known."));

    public Task RecordDenialAsync(Caller caller, string route, CancellationToken cancellationToken) => Task.CompletedTask;
}
