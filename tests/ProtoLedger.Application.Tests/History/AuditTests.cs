using System.Diagnostics;
using Npgsql;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Bundles;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Tests.Fixtures;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Bundles;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Ledger.Proofs;
using ProtoLedger.Ledger.Signatures;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.History;

public sealed class AuditTests(Hospital hospital) : IClassFixture<Hospital>
{
    private Caller Reviewer => hospital.As("v.osei", Roles.Reviewer);

    [Fact]
    public async Task Audit_AfterASignedChange_IsClean()
    {
        await SignedAsync(8600);
        var loading = new Loading("brain", 1, "three", Checked: false);
        Done(await hospital.Get<RecordLoading>().RunAsync(hospital.Technologist, loading, default));
        var same = Refused<Outcomes.Forbidden>(await hospital.Get<RecordLoading>().RunAsync(hospital.Technologist, loading with { Checked = true }, default));
        Assert.Contains("does not check", same.Detail, StringComparison.Ordinal);
        Done(await hospital.Get<RecordLoading>().RunAsync(hospital.As("l.marsh", Roles.LeadTechnologist), loading with { Checked = true }, default));
        var report = Done(await hospital.Get<AuditLedger>().RunAsync(Reviewer, null, default));
        Assert.True(report.Clean, report.First?.Words);
        Assert.Contains(report.Unknown, text => text.Contains("checkpoint kept outside", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("UPDATE document SET reason = 'another' WHERE kind = 'protocol' AND id = 'knee'", "UPDATE document SET reason = 'first version' WHERE kind = 'protocol' AND id = 'knee'", "document version")]
    [InlineData("UPDATE effective_fact SET valid_from = valid_from + interval '1 day' WHERE number = 1", "UPDATE effective_fact SET valid_from = valid_from - interval '1 day' WHERE number = 1", "effective fact")]
    [InlineData("UPDATE change_request SET decision_reason = 'none' WHERE imported", "UPDATE change_request SET decision_reason = 'fluid turned bright' WHERE imported", "change request")]
    [InlineData("UPDATE person_key SET enrolled_by = 'k.admin' WHERE account = 'b.rao'", "UPDATE person_key SET enrolled_by = 'system' WHERE account = 'b.rao'", "certificate-issued")]
    [InlineData("UPDATE ledger_node SET hash = sha256(hash) WHERE level = 1 AND index = 2", null, "node level 1 index 2")]
    public async Task Audit_AfterASuperusersChange_NamesTheRecord(string change, string? repair, string record)
    {
        await ExecuteAsync(change);
        var report = Done(await hospital.Get<AuditLedger>().RunAsync(Reviewer, null, default));
        Assert.False(report.Clean);
        Assert.StartsWith(record, report.First!.Record, StringComparison.Ordinal);
        await ExecuteAsync(repair ?? """
            UPDATE ledger_node SET hash = sha256('\x01'::bytea || (SELECT hash FROM ledger_node WHERE level = 0 AND index = 4) || (SELECT hash FROM ledger_node WHERE level = 0 AND index = 5))
            WHERE level = 1 AND index = 2
            """);
        Assert.True(Done(await hospital.Get<AuditLedger>().RunAsync(Reviewer, null, default)).Clean);
    }

    [Fact]
    public async Task Proofs_OfEveryLeafAndSize_Verify()
    {
        var checkpoint = Done(await hospital.Get<ReadLedger>().CheckpointAsync(Reviewer, default));
        var root = new Digest(checkpoint.Root);
        for (var index = 0L; index < checkpoint.Size; index += 7)
        {
            var proof = Done(await hospital.Get<ReadLedger>().InclusionAsync(Reviewer, index, checkpoint.Size, default));
            Assert.IsType<Verification.Valid>(proof.Proof.Verify(MerkleHash.Leaf(proof.Leaf), root));
        }

        var consistency = Done(await hospital.Get<ReadLedger>().ConsistencyAsync(Reviewer, 1, checkpoint.Size, default));
        var first = Done(await hospital.Get<ReadLedger>().InclusionAsync(Reviewer, 0, 1, default));
        Assert.IsType<Verification.Valid>(consistency.Verify(MerkleHash.Leaf(first.Leaf), root));
    }

    [Fact]
    public async Task Signature_CheckedByOpenSsl_IsGoodAndAChangedManifestIsNot()
    {
        var request = await SignedAsync(8700);
        var files = Done(await hospital.Get<ReadChangeRequests>().SignatureAsync(Reviewer, request.Id, 1, default));
        var anchor = Done(await hospital.Get<ReadLedger>().AnchorAsync(Caller.System, default));
        var folder = Directory.CreateTempSubdirectory("protoledger-openssl-").FullName;
        await File.WriteAllBytesAsync(Path.Combine(folder, "manifest.json"), files.Manifest);
        await File.WriteAllBytesAsync(Path.Combine(folder, "approval.p7s"), files.Cms);
        await File.WriteAllTextAsync(Path.Combine(folder, "site-ca.pem"), System.Security.Cryptography.PemEncoding.WriteString("CERTIFICATE", anchor.Certificate));
        var time = new DateTimeOffset(files.Signature.Time).ToUnixTimeSeconds();
        Assert.Equal(0, OpenSsl(folder, time));
        await File.AppendAllTextAsync(Path.Combine(folder, "manifest.json"), " ");
        Assert.NotEqual(0, OpenSsl(folder, time));
        Directory.Delete(folder, recursive: true);
    }

    [Fact]
    public async Task Bundle_OfASignedProtocol_VerifiesWithTheTrustAnchor()
    {
        await SignedAsync(8800);
        var prepared = Done(await hospital.Get<ExportBundle>().RunAsync(
            Reviewer, new BundleRequest("brain", null, new DateTime(2021, 1, 1, 0, 0, 0, DateTimeKind.Utc), DateTime.UtcNow.AddDays(1)), default));
        using var stream = new MemoryStream();
        await prepared.WriteAsync(stream, default);
        var anchor = Done(await hospital.Get<ReadLedger>().AnchorAsync(Caller.System, default));
        var trust = new BundleTrust([SigningCertificate.Parse(anchor.Certificate).Require()], [NoteKey.Parse(anchor.NoteKey).Require()]);
        var report = BundleVerifier.Verify(stream.ToArray().AsMemory(), trust);
        Assert.True(report.Outcome == BundleOutcome.Good, string.Join('\n', report.Lines()));
        using var zip = new System.IO.Compression.ZipArchive(new MemoryStream(stream.ToArray()));
        Assert.NotNull(zip.GetEntry("index.html"));
        Assert.Contains(zip.Entries, entry => entry.FullName.StartsWith("pages/report-", StringComparison.Ordinal));
    }

    private static int OpenSsl(string folder, long time)
    {
        using var process = Process.Start(new ProcessStartInfo(
            "openssl",
            $"cms -verify -binary -inform DER -in approval.p7s -content manifest.json -CAfile site-ca.pem -purpose any -attime {time} -out /dev/null")
        {
            WorkingDirectory = folder,
            RedirectStandardError = true,
        })!;
        process.StandardError.ReadToEnd();
        process.WaitForExit();
        return process.ExitCode;
    }

    private async Task<ChangeRequestView> SignedAsync(double repetitionTime)
    {
        var request = await hospital.ReviewedAsync(repetitionTime);
        var signed = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(request.Id, request.RowVersion, Passphrase), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        return signed;
    }

    private async Task ExecuteAsync(string statement)
    {
#pragma warning disable CA2100 // Made in this file.
        await using var command = hospital.Source.CreateCommand(statement);
#pragma warning restore CA2100
        Assert.True(await command.ExecuteNonQueryAsync() > 0, statement);
    }
}
