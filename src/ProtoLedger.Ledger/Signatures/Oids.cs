namespace ProtoLedger.Ledger.Signatures;

/// <summary>Object identifiers of the signature profile, with the RFC that assigns them.</summary>
internal static class Oids
{
    public const string Data = "1.2.840.113549.1.7.1";                    // RFC 5652 section 4
    public const string SignedData = "1.2.840.113549.1.7.2";              // RFC 5652 section 5.1
    public const string ContentType = "1.2.840.113549.1.9.3";             // RFC 5652 section 11.1
    public const string MessageDigest = "1.2.840.113549.1.9.4";           // RFC 5652 section 11.2
    public const string SigningTime = "1.2.840.113549.1.9.5";             // RFC 5652 section 11.3
    public const string Sha256 = "2.16.840.1.101.3.4.2.1";                // RFC 5754 section 2.2
    public const string EcdsaWithSha256 = "1.2.840.10045.4.3.2";          // RFC 5758 section 3.2
    public const string EcPublicKey = "1.2.840.10045.2.1";                // RFC 5480 section 2.1.1
    public const string P256 = "1.2.840.10045.3.1.7";                     // RFC 5480 section 2.1.1.1
    public const string DocumentSigning = "1.3.6.1.5.5.7.3.36";           // RFC 9336 section 3.1
    public const string AccountAttribute = "0.9.2342.19200300.100.1.1";   // uid, RFC 4519 section 2.39
    public const string CommonName = "2.5.4.3";                           // RFC 4519 section 2.3
    public const string CrlNumber = "2.5.29.20";                          // RFC 5280 section 5.2.3
    public const string CrlReason = "2.5.29.21";                          // RFC 5280 section 5.3.1
}
