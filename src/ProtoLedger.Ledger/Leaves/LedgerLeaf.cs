using System.Text.Json.Nodes;
using ProtoLedger.Ledger.Canonical;
using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Leaves;

/// <summary>
/// One fact of the ledger. Its canonical bytes are <c>{"actor","blobs":{name:sha256},"subject","time","type","v"}</c> and are
/// what is hashed, stored and exported; contents are kept apart, by hash.
/// </summary>
/// <param name="Type">What happened: lower-case words joined by hyphens, such as <c>version-approved</c>.</param>
/// <param name="Version">Version of this type's meaning (member <c>v</c>), ≥ 1.</param>
/// <param name="Time">UTC, whole microseconds; see <see cref="LedgerTime.Truncate"/>.</param>
/// <param name="Actor">Account that did it, not empty.</param>
/// <param name="Subject">What it was done to, not empty.</param>
/// <param name="Blobs">SHA-256 of each content, by name; may be empty.</param>
public sealed record LedgerLeaf(
    string Type, int Version, DateTimeOffset Time, string Actor, string Subject, IReadOnlyDictionary<string, Digest> Blobs)
{
    /// <summary>The canonical bytes.</summary>
    /// <exception cref="ArgumentException">A member breaks its rule above, or a text has an unpaired surrogate.</exception>
    public byte[] ToBytes()
    {
        Check(static message => new ArgumentException(message));
        var blobs = new JsonObject();
        foreach (var (name, hash) in Blobs)
        {
            blobs.Add(name, hash.ToString());
        }

        return CanonicalJson.Write(new JsonObject
        {
            ["type"] = Type,
            ["v"] = Version,
            ["time"] = LedgerTime.Format(Time),
            ["actor"] = Actor,
            ["subject"] = Subject,
            ["blobs"] = blobs,
        });
    }

    /// <summary>Leaf hash of the canonical bytes.</summary>
    public Digest Hash() => MerkleHash.Leaf(ToBytes());

    /// <summary>Reads canonical bytes; anything that <see cref="ToBytes"/> would not have written is refused.</summary>
    public static Parsed<LedgerLeaf> Parse(ReadOnlySpan<byte> bytes)
    {
        var owned = bytes.ToArray();
        return Parsed<LedgerLeaf>.From(() =>
        {
            var fields = CanonicalJson.Read(owned).Only("type", "v", "time", "actor", "subject", "blobs");
            var version = fields.Integer("v");
            var leaf = new LedgerLeaf(
                fields.Text("type"),
                version is >= 1 and <= int.MaxValue ? (int)version : throw new FormatException($"/v is {version}, must be at least 1"),
                fields.Time("time"),
                fields.Text("actor"),
                fields.Text("subject"),
                fields.Object("blobs").Digests());
            leaf.Check(static message => new FormatException(message));
            return leaf;
        });
    }

    private void Check(Func<string, Exception> fault)
    {
        if (Type.Length is 0 or > 100 || !Type.All(c => c is (>= 'a' and <= 'z') or (>= '0' and <= '9') or '-'))
        {
            throw fault($"/type is '{Type}', must be lower-case words joined by hyphens");
        }

        if (Version < 1)
        {
            throw fault($"/v is {Version}, must be at least 1");
        }

        if (Actor.Length == 0)
        {
            throw fault("/actor is empty");
        }

        if (Subject.Length == 0)
        {
            throw fault("/subject is empty");
        }

        if (Blobs.Keys.Any(name => name.Length == 0))
        {
            throw fault("/blobs has an empty name");
        }
    }
}
