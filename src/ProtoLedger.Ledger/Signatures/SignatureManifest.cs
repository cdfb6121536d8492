using System.Text.Json.Nodes;
using ProtoLedger.Ledger.Canonical;
using ProtoLedger.Ledger.Checkpoints;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>
/// What a person signs, <c>manifest.json</c>. It binds everything that a signature could otherwise be moved away from:
/// record, meaning, role, signer, time, every artefact's bytes, the model and the state of the log.
/// </summary>
/// <param name="Subject">The signed record, with its version: <c>protocol/brain-standard/7</c> or a change request's name.</param>
/// <param name="Signer">Account and printed name; both stand in the certificate too.</param>
/// <param name="Role">Role in which the person signs.</param>
/// <param name="Meaning">What the signature means.</param>
/// <param name="Time">The real time of signing, UTC, whole microseconds.</param>
/// <param name="Certificate">Fingerprint of the signer's certificate.</param>
/// <param name="ModelId">Model that made the predictions.</param>
/// <param name="Artefacts">SHA-256 of each signed file by name, such as <c>report.json</c>; at least one.</param>
/// <param name="Checkpoint">The log's checkpoint current at signing; its origin names the site.</param>
public sealed record SignatureManifest(
    string Subject, Person Signer, string Role, SignatureMeaning Meaning, DateTimeOffset Time, Digest Certificate,
    string ModelId, IReadOnlyDictionary<string, Digest> Artefacts, Checkpoint Checkpoint)
{
    private const string Kind = "protoledger-signature";

    /// <summary>The canonical bytes.</summary>
    /// <exception cref="ArgumentException">A text is empty, there is no artefact, or the time is not in whole microseconds.</exception>
    public byte[] ToBytes()
    {
        Check(static message => new ArgumentException(message));
        var artefacts = new JsonObject();
        foreach (var (name, hash) in Artefacts)
        {
            artefacts.Add(name, hash.ToString());
        }

        return CanonicalJson.Write(new JsonObject
        {
            ["format"] = 1,
            ["kind"] = Kind,
            ["subject"] = Subject,
            ["account"] = Signer.Account,
            ["displayName"] = Signer.DisplayName,
            ["role"] = Role,
            ["meaning"] = Meaning.ToWords(),
            ["time"] = LedgerTime.Format(Time),
            ["certificate"] = Certificate.ToString(),
            ["modelId"] = ModelId,
            ["artefacts"] = artefacts,
            ["checkpoint"] = new JsonObject
            {
                ["origin"] = Checkpoint.Origin,
                ["size"] = Checkpoint.Size,
                ["root"] = Checkpoint.Root.ToString(),
            },
        });
    }

    /// <summary>Reads canonical bytes; anything that <see cref="ToBytes"/> would not have written is refused.</summary>
    public static Parsed<SignatureManifest> Parse(ReadOnlySpan<byte> bytes)
    {
        var owned = bytes.ToArray();
        return Parsed<SignatureManifest>.From(() =>
        {
            var fields = CanonicalJson.Read(owned).Only(
                "account", "artefacts", "certificate", "checkpoint", "displayName", "format", "kind", "meaning", "modelId", "role", "subject", "time");
            if (fields.Text("kind") != Kind || fields.Integer("format") != 1)
            {
                throw new FormatException("/kind or /format is not that of a signature manifest");
            }

            var checkpoint = fields.Object("checkpoint").Only("origin", "root", "size");
            var manifest = new SignatureManifest(
                fields.Text("subject"), new Person(fields.Text("account"), fields.Text("displayName")), fields.Text("role"),
                SignatureMeanings.FromWords(fields.Text("meaning")) ?? throw new FormatException($"/meaning '{fields.Text("meaning")}' is not known"),
                fields.Time("time"), fields.Digest("certificate"), fields.Text("modelId"), fields.Object("artefacts").Digests(),
                new Checkpoint(checkpoint.Text("origin"), checkpoint.Integer("size"), checkpoint.Digest("root")));
            manifest.Check(static message => new FormatException(message));
            return manifest;
        });
    }

    /// <summary>
    /// Compares the manifest with the record it is shown for. A signature that is good in itself but was made for another
    /// version, protocol, meaning, site or person is found here. Null if all is equal, else the first difference.
    /// </summary>
    /// <param name="subject">The record.</param>
    /// <param name="account">Account said to have signed.</param>
    /// <param name="role">Role said to have been used.</param>
    /// <param name="meaning">Meaning said to have been given.</param>
    /// <param name="origin">Origin of this site's log.</param>
    public SignatureVerdict.BoundToOther? BoundElsewhere(string subject, string account, string role, SignatureMeaning meaning, string origin)
    {
        (string Field, string Expected, string Actual)[] pairs =
        [
            ("subject", subject, Subject),
            ("account", account, Signer.Account),
            ("role", role, Role),
            ("meaning", meaning.ToWords(), Meaning.ToWords()),
            ("origin", origin, Checkpoint.Origin),
        ];
        return pairs.Where(p => p.Expected != p.Actual)
            .Select(p => new SignatureVerdict.BoundToOther(p.Field, p.Expected, p.Actual))
            .FirstOrDefault();
    }

    /// <summary>Compares one artefact's bytes. Null if they are the signed ones.</summary>
    public SignatureVerdict? Differs(string name, ReadOnlySpan<byte> content)
    {
        if (!Artefacts.TryGetValue(name, out var expected))
        {
            return new SignatureVerdict.ArtefactNotSigned(name);
        }

        var actual = Digest.Of(content);
        return actual == expected ? null : new SignatureVerdict.ArtefactChanged(name, expected, actual);
    }

    private void Check(Func<string, Exception> fault)
    {
        (string Name, string Text)[] texts =
            [("subject", Subject), ("account", Signer.Account), ("displayName", Signer.DisplayName), ("role", Role), ("modelId", ModelId)];
        foreach (var (name, text) in texts)
        {
            if (string.IsNullOrWhiteSpace(text))
            {
                throw fault($"/{name} is empty");
            }
        }

        if (Artefacts.Count == 0 || Artefacts.Keys.Any(string.IsNullOrWhiteSpace))
        {
            throw fault("/artefacts is empty or has an empty name");
        }

        if (Checkpoint.Size < 0 || Checkpoint.Origin.Length == 0)
        {
            throw fault("/checkpoint is not valid");
        }
    }
}
