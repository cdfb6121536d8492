using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>Reads change requests and what hangs on them.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
public sealed class ReadChangeRequests(Commands commands, DocumentShelf shelf)
{
    private static readonly CommandKind Kind = new("read-change-requests", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.SignedIn;

    /// <summary>One request with its document and its base.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="id">Number.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ChangeRequestDetail>> GetAsync(Caller caller, long id, CancellationToken cancellationToken) =>
        WithAsync<ChangeRequestDetail>(
            caller,
            id,
            async (stores, row) =>
            {
                var view = await row.ViewAsync(stores, shelf, cancellationToken);
                var stood = row.BaseVersion == 0 ? null : await stores.Documents.FindAsync(row.Key, row.BaseVersion, cancellationToken);
                return new ChangeRequestDetail(view, row.Bytes, stood?.Bytes);
            },
            cancellationToken);

    /// <summary>Requests, newest first.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="filter">What to list.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<ChangeRequestView>>> ListAsync(Caller caller, ChangeRequestFilter filter, CancellationToken cancellationToken) =>
        commands.ReadAsync<IReadOnlyList<ChangeRequestView>>(
            caller,
            Kind,
            "change-requests",
            async stores =>
            {
                if (filter.Limit is < 1 or > 200)
                    return Invalid.Field("/limit", filter.Limit.ToString(System.Globalization.CultureInfo.InvariantCulture), "1 to 200", "A page has at most 200 entries.");
                var views = new List<ChangeRequestView>();
                foreach (var row in await stores.ChangeRequests.ListAsync(filter, cancellationToken))
                    views.Add(await row.ViewAsync(stores, shelf, cancellationToken));
                return Outcome.Done<IReadOnlyList<ChangeRequestView>>(views);
            },
            cancellationToken);

    /// <summary>The stored report of the present content.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="id">Number.</param>
    /// <param name="form">Which form.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<byte[]>> ReportAsync(Caller caller, long id, ReportForm form, CancellationToken cancellationToken) =>
        WithAsync<byte[]>(
            caller,
            id,
            async (stores, row) =>
            {
                if (await stores.ChangeRequests.FindReportAsync(row.Id, row.Sha256, row.Round, cancellationToken) is not { } report)
                {
                    return row.State == ChangeRequestState.UnderReview
                        ? new NotReady($"The report on change request {id} is not finished: wait for run {row.RunId}.", row.RunId)
                        : new NotFound($"Change request {id} has no report.");
                }

                var hash = form switch
                {
                    ReportForm.Json => report.JsonSha256,
                    ReportForm.Markdown => report.MarkdownSha256,
                    ReportForm.Html => report.HtmlSha256,
                    _ => report.InputsSha256,
                };
                return (await stores.Ledger.FindBlobAsync(hash, cancellationToken))!;
            },
            cancellationToken);

    /// <summary>A signature with the bytes that were signed.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="id">Request.</param>
    /// <param name="number">Number of the signature; null for the newest.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<SignatureFiles>> SignatureAsync(Caller caller, long id, int? number, CancellationToken cancellationToken) =>
        WithAsync<SignatureFiles>(
            caller,
            id,
            async (stores, row) =>
            {
                var signatures = await stores.ChangeRequests.SignaturesAsync(id, cancellationToken);
                var wanted = signatures.SingleOrDefault(signature => signature.Number == (number ?? signatures.Count));
                return wanted is null
                    ? new NotFound(number is null ? $"Change request {id} is not signed." : $"Change request {id} has no signature {number}.")
                    : new SignatureFiles(ChangeRequestViews.View(wanted, row), wanted.Manifest, wanted.Cms);
            },
            cancellationToken);

    /// <summary>Remarks, oldest first.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="id">Request.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<CommentView>>> CommentsAsync(Caller caller, long id, CancellationToken cancellationToken) =>
        WithAsync<IReadOnlyList<CommentView>>(
            caller, id, async (stores, _) => Outcome.Done(await stores.ChangeRequests.CommentsAsync(id, cancellationToken)), cancellationToken);

    private Task<Outcome<T>> WithAsync<T>(
        Caller caller, long id, Func<IStores, ChangeRequestRow, Task<Outcome<T>>> answer, CancellationToken cancellationToken) =>
        commands.ReadAsync(
            caller,
            Kind,
            Proposals.Subject(id),
            async stores => await stores.ChangeRequests.FindAsync(id, forUpdate: false, cancellationToken) is { } row
                ? await answer(stores, row)
                : Proposals.Missing(id),
            cancellationToken);
}

/// <summary>Forms of a report.</summary>
public enum ReportForm
{
    /// <summary>report.json.</summary>
    Json,

    /// <summary>report.md.</summary>
    Markdown,

    /// <summary>report.html.</summary>
    Html,

    /// <summary>inputs.json: every document that the prediction depends on, with its hash.</summary>
    Inputs,
}

/// <summary>A signature as files.</summary>
/// <param name="Signature">What it says.</param>
/// <param name="Manifest">manifest.json, the bytes that were signed.</param>
/// <param name="Cms">approval.p7s, detached CMS in DER.</param>
public sealed record SignatureFiles(SignatureView Signature, byte[] Manifest, byte[] Cms);
