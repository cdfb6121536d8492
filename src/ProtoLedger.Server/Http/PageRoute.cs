namespace ProtoLedger.Server.Http;

/// <summary>Marks a route that answers a person with a page: who is not signed in is led to the sign-in page.</summary>
internal sealed class PageRoute
{
    public static readonly PageRoute Instance = new();
}
