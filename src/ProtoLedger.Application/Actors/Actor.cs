namespace ProtoLedger.Application.Actors;

/// <summary>Who acts.</summary>
/// <param name="Name">Account name, lower case, never reused.</param>
/// <param name="DisplayName">Name as printed beside a signature.</param>
/// <param name="Roles">Roles held at this moment.</param>
/// <param name="Credential">How the actor came in.</param>
/// <param name="Scopes">Scopes of an API token; empty for a session.</param>
public sealed record Actor(
    string Name,
    string DisplayName,
    IReadOnlyList<string> Roles,
    Credential Credential = Credential.Session,
    IReadOnlyList<string>? Scopes = null)
{
    /// <summary>The program itself: imports, scheduled runs. It holds no role and cannot sign.</summary>
    public static Actor System { get; } = new("system", "ProtoLedger", [], Credential.System);

    /// <summary>Nobody signed in.</summary>
    public static Actor Anonymous { get; } = new("anonymous", "anonymous", [], Credential.None);
}

/// <summary>How an actor proved who they are.</summary>
public enum Credential
{
    /// <summary>Not at all.</summary>
    None,

    /// <summary>A session opened with a password.</summary>
    Session,

    /// <summary>An API token; it can never sign.</summary>
    Token,

    /// <summary>The program itself.</summary>
    System,
}
