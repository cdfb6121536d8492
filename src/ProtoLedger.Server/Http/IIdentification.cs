using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Server.Http;

/// <summary>What <see cref="RoleGate"/> asks the application.</summary>
internal interface IIdentification
{
    /// <summary>Who holds a token.</summary>
    Task<Outcome<Actor>> IdentifyAsync(string token, CancellationToken cancellationToken);

    /// <summary>Writes a refused request into the audit trail.</summary>
    Task RecordDenialAsync(Caller caller, string route, CancellationToken cancellationToken);
}
