using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Tests.Signatures;

/// <summary>An invented site with an authority and two physicists.</summary>
internal sealed class TestSite : IDisposable
{
    public static readonly DateTimeOffset Start = new(2026, 1, 1, 0, 0, 0, TimeSpan.Zero);
    public static readonly DateTimeOffset Signing = new(2026, 3, 4, 10, 20, 30, 123, 456, TimeSpan.Zero);

    public TestSite(string name = "Linden Hospital ProtoLedger")
    {
        Authority = SiteAuthority.Create(name, Start, Start.AddYears(20));
        Physicist = new Signer(Authority, new Person("t.okafor", "Tunde Okafor"));
        Other = new Signer(Authority, new Person("m.lindqvist", "Märta Lindqvist"));
    }

    public SiteAuthority Authority { get; }

    public Signer Physicist { get; }

    public Signer Other { get; }

    public RevocationList Revocations(params Revocation[] revocations) =>
        RevocationList.Parse(RevocationBytes(revocations)).Require();

    public byte[] RevocationBytes(params Revocation[] revocations) =>
        Authority.IssueRevocationList(revocations, 7, Signing.AddDays(30), Signing.AddDays(60));

    public void Dispose()
    {
        Physicist.Key.Dispose();
        Other.Key.Dispose();
        Authority.Dispose();
    }

    internal sealed class Signer
    {
        public Signer(SiteAuthority authority, Person person)
        {
            Key = PersonKey.Generate();
            Certificate = authority.Issue(person, Key.PublicKey, Start, Start.AddYears(2), SiteAuthority.NewSerial());
        }

        public PersonKey Key { get; }

        public SigningCertificate Certificate { get; }

        public SignatureManifest Manifest(
            string subject = "protocol/brain-standard/7", SignatureMeaning meaning = SignatureMeaning.Approved,
            string role = "physicist", string origin = "linden.example/protoledger") =>
            new(subject, Certificate.Subject, role, meaning, Signing, Certificate.Fingerprint, "model-1-abcdef",
                new Dictionary<string, Digest>
                {
                    ["report.json"] = Digest.Of("{}"u8),
                    ["report.md"] = Digest.Of("# Report"u8),
                    ["report.html"] = Digest.Of("<h1>Report</h1>"u8),
                },
                new Checkpoint(origin, 41, Digest.Of("root"u8)));
    }
}
