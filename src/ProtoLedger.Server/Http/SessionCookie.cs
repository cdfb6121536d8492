namespace ProtoLedger.Server.Http;

/// <summary>The session of a browser: the same secret that a program sends as a bearer token, in a cookie that no script reads.</summary>
internal static class SessionCookie
{
    /// <summary>A request that comes with the cookie and is not a form of a page carries this header, which a foreign site cannot send.</summary>
    public const string ScriptHeader = "X-Protoledger-Page";

    private const string Name = "__Host-protoledger";

    private static readonly CookieOptions Options = new() { HttpOnly = true, Secure = true, SameSite = SameSiteMode.Strict, Path = "/", IsEssential = true };

    /// <summary>The secret, or null.</summary>
    public static string? Read(HttpRequest request) => request.Cookies[Name];

    /// <summary>Keeps the secret until the browser closes; the server ends the session earlier.</summary>
    public static void Write(HttpResponse response, string secret) => response.Cookies.Append(Name, secret, Options);

    /// <summary>Forgets it.</summary>
    public static void Clear(HttpResponse response) => response.Cookies.Delete(Name, Options);
}
