using System.Text.Json.Nodes;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>The rules that several steps of a change request share.</summary>
internal static class Proposals
{
    private const int LongestReason = 4000;

    /// <summary>Reads a proposed document and holds it against the others; null errors where it is good.</summary>
    public static async Task<(ParseResult.Parsed? Document, Refusal? Refusal)> ReadAsync(
        Command command, DocumentShelf shelf, DocumentKey key, ReadOnlyMemory<byte> json)
    {
        if (DocumentReader.ReadJson(json.Span, key.Kind) is not ParseResult.Parsed parsed)
            return (null, ((ParseResult.Refused)DocumentReader.ReadJson(json.Span, key.Kind)).Errors.ToRefusal());
        if (parsed.Document.Id != key.Id)
            return (null, Invalid.Field("/document/id", parsed.Document.Id, key.Id, "The document names another identifier than the request."));
        var refusal = await FitsAsync(command, shelf, parsed.Document);
        return refusal is null ? (parsed, null) : (null, refusal);
    }

    /// <summary>Holds a document against the newest versions of the others.</summary>
    public static async Task<Refusal?> FitsAsync(Command command, DocumentShelf shelf, LedgerDocument document)
    {
        var errors = CrossDocumentValidation.Validate(document, await shelf.CurrentAsync(command.Stores, command.Cancellation));
        return errors.Count == 0 ? null : errors.ToRefusal();
    }

    /// <summary>Refuses a base that is not the newest version any more, and names both and what is pending.</summary>
    public static async Task<Refusal?> BaseAsync(Command command, DocumentKey key, int baseVersion, long except)
    {
        var newest = await command.Stores.Documents.NewestAsync(key, command.Cancellation);
        if (baseVersion == newest)
            return null;
        var pending = await command.Stores.ChangeRequests.PendingAsync(key, except, command.Cancellation);
        var also = pending is null ? "" : $" Change request {pending} is under review for it.";
        var stands = baseVersion == 0 ? "as a new document" : $"on version {baseVersion}";
        var detail = newest == 0
            ? $"The proposal for {key} stands {stands}, but there is no version of it yet.{also}"
            : $"The proposal for {key} stands {stands}, but the newest version is {newest}.{also}";
        return new BaseMoved(detail, baseVersion, newest, pending);
    }

    /// <summary>Refuses a missing, empty or overlong reason, and one with control characters that no reader sees.</summary>
    public static Refusal? Reason(string? reason, string pointer = "/reason")
    {
        const string Limit = "1 to 4,000 characters";
        if (string.IsNullOrWhiteSpace(reason))
            return Invalid.Field(pointer, reason, Limit, "A reason is needed: it is what people read later.");
        return Text(reason, pointer, LongestReason, Limit);
    }

    /// <summary>Refuses text that cannot be kept or shown.</summary>
    public static Refusal? Text(string text, string pointer, int longest, string limit)
    {
        if (text.Length > longest)
            return Invalid.Field(pointer, $"{text.Length} characters", limit, "The text is too long.");
        for (var i = 0; i < text.Length; i++)
        {
            if (char.IsSurrogatePair(text, i) && i + 1 < text.Length)
                i++;
            else if (char.IsSurrogate(text[i]) || (char.IsControl(text[i]) && text[i] is not ('\n' or '\t')))
                return Invalid.Field(pointer, $"U+{(int)text[i]:X4} at {i}", "printable characters, tabs and line feeds", "The text has a character that cannot be kept.");
        }

        return null;
    }

    /// <summary>The request, locked, when it exists, is the version that the client read, and is in one of the states.</summary>
    public static async Task<(ChangeRequestRow? Row, Refusal? Refusal)> TakeAsync(
        Command command, long id, long expected, string step, params ChangeRequestState[] states)
    {
        var row = await command.Stores.ChangeRequests.FindAsync(id, forUpdate: true, command.Cancellation);
        if (row is null)
            return (null, Missing(id));
        if (row.RowVersion != expected)
            return (null, new Stale($"Change request {id} was changed: you read {expected}, it is {row.RowVersion}.", expected, row.RowVersion));
        if (!states.Contains(row.State))
        {
            var allowed = string.Join(" or ", states.Select(state => $"\"{state.ToWord()}\""));
            return (null, new IllegalState($"Change request {id} is \"{row.State.ToWord()}\"; to {step} it must be {allowed}.", row.State, step));
        }

        return (row, null);
    }

    /// <summary>No such request.</summary>
    public static NotFound Missing(long id) => new($"There is no change request {id}.");

    /// <summary>Writes the row, appends its fact, and gives the view.</summary>
    public static async Task<Outcome<ChangeRequestView>> KeepAsync(
        Command command, DocumentShelf shelf, ChangeRequestRow row, LedgerWriter? ledger = null, Fact? fact = null)
    {
        if (!await command.Stores.ChangeRequests.UpdateAsync(row, command.Cancellation))
            throw new InvalidOperationException($"Change request {row.Id} changed under its lock.");
        if (ledger is not null && fact is not null)
            await ledger.AppendAsync(command, fact);
        return await (row with { RowVersion = row.RowVersion + 1 }).ViewAsync(command.Stores, shelf, command.Cancellation);
    }

    /// <summary>A fact about a request.</summary>
    public static Fact Fact(string type, ChangeRequestRow row) => new(type, Subject(row.Id), Values(row), ("document", row.Bytes));

    /// <summary>Every value of a request that is of record.</summary>
    public static JsonObject Values(ChangeRequestRow row) => new()
    {
        ["id"] = row.Id,
        ["kind"] = row.Key.KindWord,
        ["documentId"] = row.Key.Id,
        ["baseVersion"] = row.BaseVersion,
        ["sha256"] = Convert.ToHexStringLower(row.Sha256),
        ["reason"] = row.Reason,
        ["author"] = row.Author,
        ["authorName"] = row.AuthorName,
        ["state"] = row.State.ToWord(),
        ["round"] = row.Round,
        ["createdAt"] = VersionFacts.Time(row.CreatedAt),
        ["submittedAt"] = row.SubmittedAt is { } submitted ? VersionFacts.Time(submitted) : "",
        ["decidedAt"] = row.DecidedAt is { } decided ? VersionFacts.Time(decided) : "",
        ["decidedBy"] = row.DecidedBy ?? "",
        ["decisionReason"] = row.DecisionReason ?? "",
        ["version"] = row.Version ?? 0,
        ["imported"] = row.Imported,
        ["source"] = row.Source ?? "",
    };

    /// <summary>How the ledger and signatures name a request.</summary>
    public static string Subject(long id) => $"change-request/{id}";
}
