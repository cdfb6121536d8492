using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class ChangeRequestStore(Session session) : IChangeRequestStore
{
    private static readonly SqlFolder Sql = new("ChangeRequests");

    public Task<long> AddAsync(ChangeRequestRow row, CancellationToken cancellationToken) =>
        session.ValueAsync<long>(Sql["Add"], Arguments(row), cancellationToken);

    public async Task<ChangeRequestRow?> FindAsync(long id, bool forUpdate, CancellationToken cancellationToken) =>
        (await session.FindAsync<Row>(Sql[forUpdate ? "FindForUpdate" : "Find"], new { id }, cancellationToken))?.ToRequest();

    public async Task<bool> UpdateAsync(ChangeRequestRow row, CancellationToken cancellationToken) =>
        await session.ExecuteAsync(Sql["Update"], Arguments(row), cancellationToken) == 1;

    public async Task<IReadOnlyList<ChangeRequestRow>> ListAsync(ChangeRequestFilter filter, CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<Row>(
            Sql["List"],
            new
            {
                state = filter.State?.ToWord(),
                kind = filter.Document?.KindWord,
                documentId = filter.Document?.Id,
                filter.Author,
                filter.Before,
                filter.Limit,
            },
            cancellationToken)).Select(row => row.ToRequest())];

    public Task<IReadOnlyList<long>> UnderReviewAsync(CancellationToken cancellationToken) =>
        session.QueryAsync<long>(Sql["UnderReview"], null, cancellationToken);

    public Task<long?> PendingAsync(DocumentKey key, long except, CancellationToken cancellationToken) =>
        session.FindAsync<long?>(Sql["Pending"], new { kind = key.KindWord, documentId = key.Id, except }, cancellationToken);

    public Task AddReportAsync(ReportRow report, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["AddReport"], report, cancellationToken);

    public Task<ReportRow?> FindReportAsync(long id, byte[] documentSha256, int round, CancellationToken cancellationToken) =>
        session.FindAsync<ReportRow>(Sql["FindReport"], new { id, documentSha256, round }, cancellationToken);

    public Task AddSignatureAsync(SignatureRow signature, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["AddSignature"], signature, cancellationToken);

    public Task<IReadOnlyList<SignatureRow>> SignaturesAsync(long id, CancellationToken cancellationToken) =>
        session.QueryAsync<SignatureRow>(Sql["Signatures"], new { id }, cancellationToken);

    public Task<int> AddCommentAsync(long id, CommentView comment, CancellationToken cancellationToken) =>
        session.ValueAsync<int>(
            Sql["AddComment"],
            new { id, comment.Author, comment.AuthorName, comment.Pointer, comment.Text, comment.Time },
            cancellationToken);

    public Task<IReadOnlyList<CommentView>> CommentsAsync(long id, CancellationToken cancellationToken) =>
        session.QueryAsync<CommentView>(Sql["Comments"], new { id }, cancellationToken);

    private static object Arguments(ChangeRequestRow row) => new
    {
        row.Id,
        kind = row.Key.KindWord,
        documentId = row.Key.Id,
        row.BaseVersion,
        row.Bytes,
        row.Sha256,
        row.Reason,
        row.Author,
        row.AuthorName,
        state = row.State.ToWord(),
        row.RowVersion,
        row.Round,
        row.CreatedAt,
        row.SubmittedAt,
        row.DecidedAt,
        row.DecidedBy,
        row.DecisionReason,
        row.Version,
        row.Imported,
        row.Source,
        row.RunId,
    };

    internal sealed class Row
    {
        public long Id { get; init; }

        public string Kind { get; init; } = "";

        public string DocumentId { get; init; } = "";

        public int BaseVersion { get; init; }

        public byte[] Bytes { get; init; } = [];

        public byte[] Sha256 { get; init; } = [];

        public string Reason { get; init; } = "";

        public string Author { get; init; } = "";

        public string AuthorName { get; init; } = "";

        public string State { get; init; } = "";

        public long RowVersion { get; init; }

        public int Round { get; init; }

        public DateTime CreatedAt { get; init; }

        public DateTime? SubmittedAt { get; init; }

        public DateTime? DecidedAt { get; init; }

        public string? DecidedBy { get; init; }

        public string? DecisionReason { get; init; }

        public int? Version { get; init; }

        public bool Imported { get; init; }

        public string? Source { get; init; }

        public long? RunId { get; init; }

        public ChangeRequestRow ToRequest() => new(
            Id, Rows.Key(Kind, DocumentId), BaseVersion, Bytes, Sha256, Reason, Author, AuthorName, ChangeRequestStates.FromWord(State),
            RowVersion, Round, CreatedAt, SubmittedAt, DecidedAt, DecidedBy, DecisionReason, Version, Imported, Source, RunId);
    }
}
