namespace ProtoLedger.Ledger.Signatures;

/// <summary>What a signature means.</summary>
public enum SignatureMeaning
{
    /// <summary>Wrote the proposal.</summary>
    Authored,

    /// <summary>Read and checked it.</summary>
    Reviewed,

    /// <summary>Approves it as the responsible physicist.</summary>
    Approved,

    /// <summary>Accepts it clinically as a radiologist.</summary>
    ClinicallyAccepted,

    /// <summary>States that it is ready to be loaded at the console.</summary>
    ReadyToLoad,

    /// <summary>States that this is what runs today, without having approved it before.</summary>
    AsFound,

    /// <summary>States that a periodic review was made.</summary>
    PeriodicallyReviewed,
}

/// <summary>The words that stand in manifests and reports.</summary>
public static class SignatureMeanings
{
    private static readonly Dictionary<SignatureMeaning, string> Words = new()
    {
        [SignatureMeaning.Authored] = "authored",
        [SignatureMeaning.Reviewed] = "reviewed",
        [SignatureMeaning.Approved] = "approved",
        [SignatureMeaning.ClinicallyAccepted] = "clinically accepted",
        [SignatureMeaning.ReadyToLoad] = "ready to load",
        [SignatureMeaning.AsFound] = "as found",
        [SignatureMeaning.PeriodicallyReviewed] = "periodically reviewed",
    };

    /// <summary>The words of a meaning.</summary>
    public static string ToWords(this SignatureMeaning meaning) => Words[meaning];

    /// <summary>The meaning of the words, or null where there is none.</summary>
    public static SignatureMeaning? FromWords(string words) =>
        Words.Where(p => p.Value == words).Select(p => (SignatureMeaning?)p.Key).FirstOrDefault();
}
