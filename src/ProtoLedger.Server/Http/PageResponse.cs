namespace ProtoLedger.Server.Http;

/// <summary>A page of a list.</summary>
/// <typeparam name="T">Type of an item.</typeparam>
/// <param name="Items">Items; the header Link leads to the next page.</param>
internal sealed record PageResponse<T>(IReadOnlyList<T> Items);
