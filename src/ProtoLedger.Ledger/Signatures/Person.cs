namespace ProtoLedger.Ledger.Signatures;

/// <summary>Who a certificate is for.</summary>
/// <param name="Account">Account name, never reused: attribute uid of the subject.</param>
/// <param name="DisplayName">Name as printed beside a signature: common name of the subject.</param>
public sealed record Person(string Account, string DisplayName);
