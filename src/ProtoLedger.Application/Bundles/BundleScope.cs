using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.Bundles;

/// <summary>Which facts and requests a bundle holds in full; every leaf of the ledger is in it either way.</summary>
internal sealed class BundleScope
{
    /// <summary>Picks what belongs to the request.</summary>
    public BundleScope(
        BundleRequest request, IReadOnlyList<(long Sequence, LedgerLeaf Leaf)> leaves, IReadOnlyList<ChangeRequestRow> requests)
    {
        Request = request;
        Requests = [.. requests.Where(row => row.State != ChangeRequestState.Draft && Concerns(row.Key.Kind, row.Key.Id) && row.CreatedAt < request.Until)];
        var subjects = Requests.Select(row => Proposals.Subject(row.Id)).ToHashSet(StringComparer.Ordinal);
        Leaves = [.. leaves.Where(pair => Concerns(pair.Leaf, subjects))];
    }

    /// <summary>What was asked for.</summary>
    public BundleRequest Request { get; }

    /// <summary>Requests in scope, drafts left out.</summary>
    public IReadOnlyList<ChangeRequestRow> Requests { get; }

    /// <summary>Leaves in scope.</summary>
    public IReadOnlyList<(long Sequence, LedgerLeaf Leaf)> Leaves { get; }

    /// <summary>A protocol only when it is the one asked for; every other kind of document, since predictions depend on it.</summary>
    public bool Concerns(DocumentKind kind, string id) => kind != DocumentKind.Protocol || Request.Protocol is null || id == Request.Protocol;

    private bool Concerns(LedgerLeaf leaf, HashSet<string> subjects)
    {
        var parts = leaf.Subject.Split('/', '@');
        return parts[0] switch
        {
            "change-request" => subjects.Contains(leaf.Subject),
            "protocol" => Request.Protocol is null || parts[1] == Request.Protocol,
            _ => true,
        };
    }
}

/// <summary>A file that a reader of the binder may open.</summary>
/// <param name="Name">Path in the bundle.</param>
/// <param name="What">In words.</param>
/// <param name="Hash">SHA-256.</param>
/// <param name="Request">Change request whose report it is; 0 otherwise.</param>
internal sealed record BundledFile(string Name, string What, Digest Hash, long Request = 0);
