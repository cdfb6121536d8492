using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Ledger.Proofs;
using ProtoLedger.Ledger.Tests.Merkle;

namespace ProtoLedger.Ledger.Tests.Proofs;

public sealed class InclusionProofTests
{
    private const int Largest = 64;
    private static readonly TestTree Tree = new(Largest);

    [Fact]
    public void Build_EveryIndexAndSizeTo64_EqualsTheRfcAndVerifies()
    {
        var cases = 0;
        foreach (var (index, size) in Pairs())
        {
            var proof = InclusionProof.Build(index, size, Tree);
            Assert.Equal(
                ReferenceTree.Path(index, [.. Tree.Leaves.Take(size)]).Select(Convert.ToHexStringLower),
                proof.Path.Select(h => h.ToString()));
            Assert.IsType<Verification.Valid>(proof.Verify(Tree.LeafHashes[index], Tree.Roots[size]));
            cases++;
        }

        Assert.Equal(2080, cases);
    }

    [Fact]
    public void Verify_EveryMutationOfEveryProofTo64_IsRefused()
    {
        var negatives = 0;
        foreach (var (index, size) in Pairs())
        {
            var proof = InclusionProof.Build(index, size, Tree);
            var (leaf, root) = (Tree.LeafHashes[index], Tree.Roots[size]);
            foreach (var (name, mutated, otherLeaf, otherRoot) in Mutated(proof, leaf, root))
            {
                Assert.False(mutated.Verify(otherLeaf, otherRoot).Holds, $"index {index} of {size}: {name}");
                negatives++;
            }
        }

        Assert.True(negatives > 60_000, $"{negatives} negatives");
    }

    [Fact]
    public void Verify_HostileNumbers_GiveAValueAndNoException()
    {
        long[] numbers = [long.MinValue, -1, 0, 1, 5, 1L << 40, 1L << 62, long.MaxValue];
        foreach (var index in numbers)
        {
            foreach (var size in numbers)
            {
                Assert.False(new InclusionProof(index, size, [Tree.Roots[3]]).Verify(Tree.LeafHashes[0], Tree.Roots[5]).Holds);
            }
        }
    }

    [Fact]
    public void Verify_WrongRoot_KeepsBothSides()
    {
        var proof = InclusionProof.Build(2, 7, Tree);
        var mismatch = Assert.IsType<Verification.RootMismatch>(proof.Verify(Tree.LeafHashes[2], Tree.Roots[6]));
        Assert.Equal(Tree.Roots[6], mismatch.Expected);
        Assert.Equal(Tree.Roots[7], mismatch.Computed);
    }

    [Fact]
    public void Needs_NamesExactlyTheNodesThatBuildReads()
    {
        foreach (var (index, size) in Pairs())
        {
            Tree.Read.Clear();
            InclusionProof.Build(index, size, Tree);
            Assert.Equal(Tree.Read, InclusionProof.Needs(index, size));
        }
    }

    [Fact]
    public void Needs_AtAMillionLeaves_AreLogarithmicallyFew()
    {
        foreach (var index in (long[])[0, 1, 499_999, 999_998, 999_999])
        {
            Assert.InRange(InclusionProof.Needs(index, 1_000_000).Count, 1, 40);
        }
    }

    private static IEnumerable<(int Index, int Size)> Pairs() =>
        from size in Enumerable.Range(1, Largest) from index in Enumerable.Range(0, size) select (index, size);

    private static IEnumerable<(string Name, InclusionProof Proof, Digest Leaf, Digest Root)> Mutated(InclusionProof proof, Digest leaf, Digest root)
    {
        foreach (var (name, path) in Mutations.OfPath(proof.Path, root))
        {
            yield return (name, proof with { Path = path }, leaf, root);
        }

        foreach (var (name, other) in Mutations.OfRoot(root))
        {
            yield return (name, proof, leaf, other);
        }

        yield return ("index - 1", proof with { Index = proof.Index - 1 }, leaf, root);
        yield return ("index + 1", proof with { Index = proof.Index + 1 }, leaf, root);
        yield return ("index ^ 2", proof with { Index = proof.Index ^ 2 }, leaf, root);
        yield return ("size × 2", proof with { Size = proof.Size * 2 }, leaf, root);
        yield return ("size ÷ 2", proof with { Size = proof.Size / 2 }, leaf, root);
        yield return ("wrong leaf", proof, MerkleHash.Leaf("wrong"u8), root);
        yield return ("leaf with a bit flipped", proof, Mutations.Flip(leaf, 100), root);
        yield return ("empty leaf hash", proof, default, root);
        if (leaf != root)
        {
            yield return ("leaf and root swapped", proof, root, leaf);
        }
    }
}
