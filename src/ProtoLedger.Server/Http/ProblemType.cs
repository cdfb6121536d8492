namespace ProtoLedger.Server.Http;

/// <summary>A kind of problem that the API reports; each has a page in docs/problems.</summary>
/// <param name="Name">Last part of its URI and name of its page.</param>
/// <param name="Status">HTTP status.</param>
/// <param name="Title">Short, the same for every occurrence.</param>
internal sealed record ProblemType(string Name, int Status, string Title)
{
    public string Uri => $"/problems/{Name}";
}
