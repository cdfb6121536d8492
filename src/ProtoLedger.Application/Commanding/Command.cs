using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Commanding;

/// <summary>What a command has at hand while it runs.</summary>
/// <param name="Stores">Stores of its one transaction.</param>
/// <param name="Now">UTC, whole microseconds; one time for everything that the command writes.</param>
/// <param name="Actor">Who asked.</param>
/// <param name="Cancellation">Stops it.</param>
internal sealed record Command(IStores Stores, DateTime Now, Actor Actor, CancellationToken Cancellation);

/// <summary>Names a use case and who may run it.</summary>
/// <param name="Action">As the audit trail calls it, such as <c>approve-change-request</c>.</param>
/// <param name="Rule">Who may.</param>
/// <param name="NeedsKey">True where a repeated request must carry an idempotency key.</param>
internal sealed record CommandKind(string Action, RoleRule Rule, bool NeedsKey = false);
