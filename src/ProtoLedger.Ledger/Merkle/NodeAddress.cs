namespace ProtoLedger.Ledger.Merkle;

/// <summary>Place of a complete subtree: level 0 is a leaf hash, level k covers leaves [Index · 2^k, (Index + 1) · 2^k).</summary>
/// <param name="Level">0 to 62.</param>
/// <param name="Index">0-based from the left, among the nodes of this level.</param>
public readonly record struct NodeAddress(int Level, long Index);

/// <summary>A complete subtree's hash; it never changes once it exists, so that it can be stored once.</summary>
public readonly record struct TreeNode(NodeAddress Address, Digest Hash);
