using System.Security.Cryptography;
using System.Text.Json;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Commanding;

/// <summary>
/// Runs a use case: the role rule first, then one transaction that holds the effect, its audit event and the answer kept
/// for the idempotency key. What is refused leaves no trace but an audit event.
/// </summary>
public sealed class Commands
{
    private static readonly JsonSerializerOptions Json = new(JsonSerializerDefaults.Web);
    private readonly ITransactions transactions;
    private readonly TimeProvider clock;

    /// <summary>On the given stores and clock.</summary>
    /// <param name="transactions">Transactions.</param>
    /// <param name="clock">The real clock outside tests.</param>
    public Commands(ITransactions transactions, TimeProvider clock) => (this.transactions, this.clock) = (transactions, clock);

    /// <summary>Changes something.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="kind">Which use case.</param>
    /// <param name="subject">What it is about, for the audit trail.</param>
    /// <param name="request">What identifies the request; secrets left out.</param>
    /// <param name="work">The effect.</param>
    /// <param name="cancellationToken">Stops it.</param>
    internal async Task<Outcome<T>> WriteAsync<T>(
        Caller caller, CommandKind kind, string subject, object request, Func<Command, Task<Outcome<T>>> work, CancellationToken cancellationToken)
    {
        if (Refuse(caller, kind) is { } refused)
            return await DeniedAsync<T>(caller, kind, subject, refused, cancellationToken);
        var requestHash = SHA256.HashData(JsonSerializer.SerializeToUtf8Bytes(new { kind.Action, subject, request }, Json));
        var outcome = await transactions.WriteAsync(
            async stores => await RunAsync(new Command(stores, clock.Now(), caller.Actor, cancellationToken), caller, kind, subject, requestHash, work),
            cancellationToken);
        return outcome.Refusal is Forbidden or CannotSign or Unauthenticated or LockedOut
            ? await DeniedAsync<T>(caller, kind, subject, outcome.Refusal, cancellationToken)
            : outcome;
    }

    /// <summary>Reads something. Only reads that the audit trail must show are recorded.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="kind">Which use case.</param>
    /// <param name="subject">What it is about.</param>
    /// <param name="work">The answer.</param>
    /// <param name="cancellationToken">Stops it.</param>
    internal async Task<Outcome<T>> ReadAsync<T>(
        Caller caller, CommandKind kind, string subject, Func<IStores, Task<Outcome<T>>> work, CancellationToken cancellationToken) =>
        Refuse(caller, kind) is { } refused
            ? await DeniedAsync<T>(caller, kind, subject, refused, cancellationToken)
            : await transactions.ReadAsync(work, cancellationToken);

    /// <summary>Writes one event of the audit trail in a transaction of its own.</summary>
    internal Task RecordAsync(Caller caller, string action, string subject, string outcome, string detail, CancellationToken cancellationToken) =>
        transactions.WriteAsync<bool>(
            async stores =>
            {
                await stores.Audit.AddAsync(Event(caller, clock.Now(), action, subject, outcome, detail), cancellationToken);
                return true;
            },
            cancellationToken);

    private static Refusal? Refuse(Caller caller, CommandKind kind)
    {
        if (!kind.Rule.Allows(caller.Actor))
        {
            return caller.Actor.Credential == Credential.None
                ? new Unauthenticated("Sign in first.")
                : new Forbidden($"{caller.Actor.Name} may not: the rule is \"{kind.Rule.Name}\".");
        }

        if (kind.NeedsKey && caller.Actor.Credential != Credential.System && caller.IdempotencyKey is null)
            return Invalid.Field("/Idempotency-Key", null, "1 to 200 characters", "A request that makes something needs an Idempotency-Key.");
        return caller.IdempotencyKey is { Length: 0 or > 200 } key
            ? Invalid.Field("/Idempotency-Key", key[..Math.Min(20, key.Length)], "1 to 200 characters", "The Idempotency-Key is empty or too long.")
            : null;
    }

    private static AuditEvent Event(Caller caller, DateTime now, string action, string subject, string outcome, string detail) =>
        new(0, now, caller.Actor.Name, action, subject, outcome, detail, caller.Address);

    private static async Task<Outcome<T>> RunAsync<T>(
        Command command, Caller caller, CommandKind kind, string subject, byte[] requestHash, Func<Command, Task<Outcome<T>>> work)
    {
        var (stores, account, cancellation) = (command.Stores, caller.Actor.Name, command.Cancellation);
        if (caller.IdempotencyKey is { } key)
        {
            if (!await stores.Idempotency.TryLockAsync(account, key, cancellation))
                return new InFlight("A request with this Idempotency-Key is being worked on.");
            if (await stores.Idempotency.FindAsync(account, key, cancellation) is { } kept)
            {
                return kept.RequestSha256.AsSpan().SequenceEqual(requestHash)
                    ? JsonSerializer.Deserialize<T>(kept.Response, Json)!
                    : new KeyReused("This Idempotency-Key was used for another request.");
            }
        }

        var outcome = await work(command);
        if (!outcome.Succeeded)
            return outcome;
        await stores.Audit.AddAsync(Event(caller, command.Now, kind.Action, subject, "done", ""), cancellation);
        if (caller.IdempotencyKey is { } used)
        {
            var response = JsonSerializer.SerializeToUtf8Bytes(outcome.Value, Json);
            await stores.Idempotency.AddAsync(account, used, new KeptAnswer(requestHash, response, command.Now), cancellation);
        }

        return outcome;
    }

    private async Task<Outcome<T>> DeniedAsync<T>(
        Caller caller, CommandKind kind, string subject, Refusal refusal, CancellationToken cancellationToken)
    {
        if (refusal is not Invalid)
            await RecordAsync(caller, kind.Action, subject, "denied", refusal.Detail, cancellationToken);
        return refusal;
    }
}
