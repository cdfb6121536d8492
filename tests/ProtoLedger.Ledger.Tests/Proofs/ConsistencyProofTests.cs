using ProtoLedger.Ledger.Proofs;
using ProtoLedger.Ledger.Tests.Merkle;

namespace ProtoLedger.Ledger.Tests.Proofs;

public sealed class ConsistencyProofTests
{
    private const int Largest = 64;
    private static readonly TestTree Tree = new(Largest);

    [Fact]
    public void Build_EveryPairOfSizesTo64_EqualsTheRfcAndVerifies()
    {
        var cases = 0;
        foreach (var (from, to) in Pairs())
        {
            var proof = ConsistencyProof.Build(from, to, Tree);
            var reference = from == 0 ? [] : ReferenceTree.Proof(from, [.. Tree.Leaves.Take(to)]);
            Assert.Equal(reference.Select(Convert.ToHexStringLower), proof.Path.Select(h => h.ToString()));
            Assert.IsType<Verification.Valid>(proof.Verify(Tree.Roots[from], Tree.Roots[to]));
            cases++;
        }

        Assert.Equal(2145, cases); // 2,080 with 1 ≤ from ≤ to ≤ 64 and 65 from the empty tree.
    }

    [Fact]
    public void Verify_EveryMutationOfEveryProofTo64_IsRefused()
    {
        var negatives = 0;
        foreach (var (from, to) in Pairs())
        {
            var proof = ConsistencyProof.Build(from, to, Tree);
            foreach (var (name, mutated, fromRoot, toRoot) in Mutated(proof, Tree.Roots[from], Tree.Roots[to]))
            {
                Assert.False(mutated.Verify(fromRoot, toRoot).Holds, $"{from} to {to}: {name}");
                negatives++;
            }
        }

        Assert.True(negatives > 60_000, $"{negatives} negatives");
    }

    [Fact]
    public void Verify_HostileNumbers_GiveAValueAndNoException()
    {
        long[] numbers = [long.MinValue, -1, 1, 5, 1L << 40, 1L << 62, long.MaxValue];
        foreach (var from in numbers)
        {
            foreach (var to in numbers)
            {
                Assert.False(new ConsistencyProof(from, to, [Tree.Roots[3]]).Verify(Tree.Roots[4], Tree.Roots[5]).Holds);
            }
        }
    }

    [Fact]
    public void Verify_RewrittenHistory_KeepsBothSidesOfTheEarlierRoot()
    {
        var proof = ConsistencyProof.Build(6, 11, Tree);
        var mismatch = Assert.IsType<Verification.EarlierRootMismatch>(proof.Verify(Tree.Roots[5], Tree.Roots[11]));
        Assert.Equal(Tree.Roots[5], mismatch.Expected);
        Assert.Equal(Tree.Roots[6], mismatch.Computed);
    }

    [Fact]
    public void Needs_NamesExactlyTheNodesThatBuildReads()
    {
        foreach (var (from, to) in Pairs())
        {
            Tree.Read.Clear();
            ConsistencyProof.Build(from, to, Tree);
            Assert.Equal(Tree.Read, ConsistencyProof.Needs(from, to));
        }
    }

    private static IEnumerable<(int From, int To)> Pairs() =>
        from to in Enumerable.Range(0, Largest + 1) from m in Enumerable.Range(0, to + 1) select (m, to);

    private static IEnumerable<(string Name, ConsistencyProof Proof, Digest FromRoot, Digest ToRoot)> Mutated(
        ConsistencyProof proof, Digest fromRoot, Digest toRoot)
    {
        foreach (var (name, path) in Mutations.OfPath(proof.Path, toRoot))
        {
            yield return (name, proof with { Path = path }, fromRoot, toRoot);
        }

        foreach (var (name, other) in Mutations.OfRoot(fromRoot))
        {
            yield return ($"earlier: {name}", proof, other, toRoot);
        }

        // Every tree is an extension of the empty one, whatever its root: there a later root cannot be wrong.
        if (proof.From == 0)
        {
            yield break;
        }

        foreach (var (name, other) in Mutations.OfRoot(toRoot))
        {
            yield return ($"later: {name}", proof, fromRoot, other);
        }

        yield return ("sizes swapped", proof with { From = proof.To + 1, To = proof.From }, fromRoot, toRoot);
        if (proof.From < proof.To)
        {
            yield return ("swapped roots", proof, toRoot, fromRoot);
            yield return ("from - 1", proof with { From = proof.From - 1 }, fromRoot, toRoot);
            yield return ("from + 1", proof with { From = proof.From + 1 }, fromRoot, toRoot);
            yield return ("from ^ 2", proof with { From = proof.From ^ 2 }, fromRoot, toRoot);
            yield return ("to × 2", proof with { To = proof.To * 2 }, fromRoot, toRoot);
            yield return ("to ÷ 2", proof with { To = proof.To / 2 }, fromRoot, toRoot);
        }
    }
}
