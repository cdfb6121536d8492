namespace ProtoLedger.Server.Features.Documents;

/// <summary>Rows of one version, and the address of that version.</summary>
internal sealed record DocumentRowsView(string Address, IReadOnlyList<RowGroup> Groups);
