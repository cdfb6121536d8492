namespace ProtoLedger.Ledger.Signatures;

/// <summary>A certificate that must not sign any more.</summary>
/// <param name="Serial"><see cref="SigningCertificate.Serial"/>.</param>
/// <param name="Time">From when; signatures made before stay good. Whole seconds.</param>
/// <param name="Reason">Why.</param>
public sealed record Revocation(string Serial, DateTimeOffset Time, RevocationReason Reason);

/// <summary>Reasons of RFC 5280 section 5.3.1 that occur here.</summary>
public enum RevocationReason
{
    /// <summary>Not stated.</summary>
    Unspecified = 0,

    /// <summary>The private key or its passphrase may be known to somebody else.</summary>
    KeyCompromise = 1,

    /// <summary>The person's name or role changed.</summary>
    AffiliationChanged = 3,

    /// <summary>Replaced by a renewed certificate, for example after a reset.</summary>
    Superseded = 4,

    /// <summary>The person left.</summary>
    CessationOfOperation = 5,
}
