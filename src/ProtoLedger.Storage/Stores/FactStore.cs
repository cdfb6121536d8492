using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class FactStore(Session session) : IFactStore
{
    private static readonly SqlFolder Sql = new("Facts");

    public Task AddEffectiveAsync(EffectiveRow fact, CancellationToken cancellationToken) =>
        session.ExecuteAsync(
            Sql["AddEffective"],
            new
            {
                kind = fact.Key.KindWord,
                documentId = fact.Key.Id,
                fact.Version,
                fact.Scanner,
                validFrom = fact.From,
                fact.RecordedAt,
                fact.RecordedBy,
                fact.ChangeRequestId,
                fact.Imported,
            },
            cancellationToken);

    public Task<IReadOnlyList<EffectiveInterval>> IntervalsAsync(DocumentKey key, CancellationToken cancellationToken) =>
        ListAsync("Intervals", new { kind = key.KindWord, documentId = key.Id }, cancellationToken);

    public Task<IReadOnlyList<EffectiveInterval>> EffectiveAtAsync(DateTime at, CancellationToken cancellationToken) =>
        ListAsync("EffectiveAt", new { at }, cancellationToken);

    public Task AddLoadedAsync(LoadedRow fact, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["AddLoaded"], fact, cancellationToken);

    public Task<IReadOnlyList<LoadedRow>> LoadedAsync(string protocol, CancellationToken cancellationToken) =>
        session.QueryAsync<LoadedRow>(Sql["Loaded"], new { protocol }, cancellationToken);

    private async Task<IReadOnlyList<EffectiveInterval>> ListAsync(string operation, object arguments, CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<Row>(Sql[operation], arguments, cancellationToken)).Select(row => row.ToInterval())];

    private sealed class Row
    {
        public string Kind { get; init; } = "";

        public string DocumentId { get; init; } = "";

        public int Version { get; init; }

        public string Scanner { get; init; } = "";

        public DateTime ValidFrom { get; init; }

        public DateTime? ValidUntil { get; init; }

        public DateTime RecordedAt { get; init; }

        public string RecordedBy { get; init; } = "";

        public long? ChangeRequestId { get; init; }

        public bool Imported { get; init; }

        public EffectiveInterval ToInterval() =>
            new(Rows.Key(Kind, DocumentId), Version, Scanner, ValidFrom, ValidUntil, RecordedAt, RecordedBy, ChangeRequestId, Imported);
    }
}
