namespace ProtoLedger.Ledger.Merkle;

/// <summary>
/// Reads hashes of complete subtrees. A caller whose nodes are in a database asks
/// <see cref="Proofs.InclusionProof.Needs"/> or <see cref="Proofs.ConsistencyProof.Needs"/> first, fetches all of them
/// in one query, and passes a <see cref="StoredNodes"/>.
/// </summary>
public interface ITreeNodes
{
    /// <summary>Hash of the complete subtree at <paramref name="address"/>.</summary>
    /// <exception cref="KeyNotFoundException">It is not there: the store is damaged or the tree is smaller.</exception>
    Digest Hash(NodeAddress address);
}
