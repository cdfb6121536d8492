using System.Security.Cryptography;
using System.Text.Json;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.History;
using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Ledger.Proofs;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Ledger;

internal static class LedgerEndpoints
{
    private const int UsualLeaves = 100;

    internal static IEndpointRouteBuilder MapLedger(this IEndpointRouteBuilder routes)
    {
        var ledger = routes.MapGroup("/api/v1/ledger").WithTags("Ledger").Needs(ReadLedger.Rule);
        ledger.MapGet("/checkpoint", CheckpointAsync).WithName("GetCheckpoint").WithSummary("The newest checkpoint, a signed note")
            .Produces(StatusCodes.Status200OK, contentType: "text/plain").Refuses(Problems.Missing);
        ledger.MapGet("/proofs/inclusion", InclusionAsync).WithName("GetInclusionProof").WithSummary("Proof that a leaf is in a tree (RFC 9162)")
            .Refuses(Problems.MalformedRequest, Problems.InvalidContent);
        ledger.MapGet("/proofs/consistency", ConsistencyAsync).WithName("GetConsistencyProof").WithSummary("Proof that a tree begins with an earlier one (RFC 9162)")
            .Refuses(Problems.MalformedRequest, Problems.InvalidContent);
        ledger.MapGet("/leaves", LeavesAsync).WithName("ListLeaves").WithSummary("Leaves from a number on")
            .Refuses(Problems.MalformedRequest, Problems.InvalidContent);
        var site = routes.MapGroup("/api/v1").WithTags("Trust anchor").Needs(ReadLedger.AnchorRule);
        site.MapGet("/site-ca.pem", AuthorityAsync).WithName("GetAuthority").WithSummary("Certificate of the site's authority; compare its fingerprint with what you were told by another way")
            .Produces(StatusCodes.Status200OK, contentType: "application/x-pem-file");
        site.MapGet("/site-ca.crl", RevocationsAsync).WithName("GetRevocationList").WithSummary("Certificates that sign no more, DER")
            .Produces(StatusCodes.Status200OK, contentType: "application/pkix-crl");
        site.MapGet("/site.vkey", NoteKeyAsync).WithName("GetNoteKey").WithSummary("Key with which checkpoints verify")
            .Produces(StatusCodes.Status200OK, contentType: "text/plain");
        return routes;
    }

    private static async Task<IResult> CheckpointAsync(Caller caller, ReadLedger useCase, CancellationToken cancellationToken)
    {
        var outcome = await useCase.CheckpointAsync(caller, cancellationToken);
        return outcome.Succeeded ? TypedResults.Text(outcome.Value.Note, "text/plain; charset=utf-8") : Problems.From(outcome.Refusal);
    }

    private static async Task<Results<Ok<InclusionResponse>, Problem>> InclusionAsync(
        Caller caller, ReadLedger useCase, string? index, string? size, CancellationToken cancellationToken)
    {
        var query = new Query();
        var (leaf, tree) = (query.RequiredNumber("index", index, 0, long.MaxValue), query.Number("size", size, 1, long.MaxValue));
        query.Demand();
        return (await useCase.InclusionAsync(caller, leaf, tree, cancellationToken)).ToOk(InclusionResponse.From);
    }

    private static async Task<Results<Ok<ConsistencyResponse>, Problem>> ConsistencyAsync(
        Caller caller, ReadLedger useCase, string? from, string? to, CancellationToken cancellationToken)
    {
        var query = new Query();
        var (earlier, later) = (query.RequiredNumber("from", from, 1, long.MaxValue), query.Number("to", to, 1, long.MaxValue));
        query.Demand();
        return (await useCase.ConsistencyAsync(caller, earlier, later, cancellationToken)).ToOk(ConsistencyResponse.Of);
    }

    private static async Task<Results<Ok<PageResponse<LeafResponse>>, Problem>> LeavesAsync(
        HttpContext context, Caller caller, ReadLedger useCase, string? from, string? limit, CancellationToken cancellationToken)
    {
        var query = new Query();
        var first = query.Number("from", from, 0, long.MaxValue) ?? 0;
        var most = (int)(query.Number("limit", limit, 1, 1000) ?? UsualLeaves);
        query.Demand();
        var leaves = await useCase.LeavesAsync(caller, first, most, cancellationToken);
        if (leaves.Succeeded && leaves.Value.Count == most)
            Paging.AddNext(context, "from", $"{first + most}");
        return leaves.ToOk(rows => new PageResponse<LeafResponse>([.. rows.Select(r => new LeafResponse(r.Sequence, Convert.ToBase64String(r.Hash), JsonElement.Parse(r.Bytes)))]));
    }

    private static Task<IResult> AuthorityAsync(Caller caller, ReadLedger useCase, CancellationToken cancellationToken) =>
        AnchorAsync(caller, useCase, anchor => TypedResults.Text(PemEncoding.WriteString("CERTIFICATE", anchor.Certificate) + "\n", "application/x-pem-file"), cancellationToken);

    private static Task<IResult> RevocationsAsync(Caller caller, ReadLedger useCase, CancellationToken cancellationToken) =>
        AnchorAsync(caller, useCase, anchor => TypedResults.Bytes(anchor.RevocationList, "application/pkix-crl"), cancellationToken);

    private static Task<IResult> NoteKeyAsync(Caller caller, ReadLedger useCase, CancellationToken cancellationToken) =>
        AnchorAsync(caller, useCase, anchor => TypedResults.Text(anchor.NoteKey + "\n", "text/plain; charset=utf-8"), cancellationToken);

    private static async Task<IResult> AnchorAsync(Caller caller, ReadLedger useCase, Func<TrustAnchor, IResult> send, CancellationToken cancellationToken)
    {
        var anchor = await useCase.AnchorAsync(caller, cancellationToken);
        return anchor.Succeeded ? send(anchor.Value) : Problems.From(anchor.Refusal);
    }
}

/// <summary>A proof of inclusion; hashes are SHA-256 in base64.</summary>
/// <param name="Index">Number of the leaf, from 0.</param>
/// <param name="Size">Leaves of the tree.</param>
/// <param name="LeafHash">SHA-256 of a zero byte and the leaf.</param>
/// <param name="Path">Sibling hashes from the leaf upwards.</param>
/// <param name="Leaf">Canonical bytes of the leaf, base64.</param>
internal sealed record InclusionResponse(long Index, long Size, string LeafHash, IReadOnlyList<string> Path, string Leaf)
{
    public static InclusionResponse From(LeafProof proof) => new(
        proof.Proof.Index, proof.Proof.Size, MerkleHash.Leaf(proof.Leaf).ToBase64(), [.. proof.Proof.Path.Select(h => h.ToBase64())], Convert.ToBase64String(proof.Leaf));
}

/// <summary>A proof of consistency; hashes are SHA-256 in base64.</summary>
/// <param name="From">Leaves of the earlier tree.</param>
/// <param name="To">Leaves of the later tree.</param>
/// <param name="Path">Hashes as in RFC 9162, section 2.1.4.</param>
internal sealed record ConsistencyResponse(long From, long To, IReadOnlyList<string> Path)
{
    public static ConsistencyResponse Of(ConsistencyProof proof) => new(proof.From, proof.To, [.. proof.Path.Select(h => h.ToBase64())]);
}

/// <summary>A leaf.</summary>
/// <param name="Index">Number, from 0.</param>
/// <param name="Hash">Leaf hash, base64.</param>
/// <param name="Leaf">The leaf as JSON.</param>
internal sealed record LeafResponse(long Index, string Hash, JsonElement Leaf);
