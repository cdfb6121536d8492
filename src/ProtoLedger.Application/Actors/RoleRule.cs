namespace ProtoLedger.Application.Actors;

/// <summary>Who may run a use case. Every use case has one; what no rule allows is refused.</summary>
/// <param name="Name">Short name, as tables and problems show it.</param>
/// <param name="AllowedRoles">Roles of which one is needed; empty where any signed-in actor will do.</param>
/// <param name="AllowsAnonymous">True where nobody needs to be signed in.</param>
/// <param name="Scope">Scope that an API token needs; null where tokens are refused.</param>
public sealed record RoleRule(string Name, IReadOnlyList<string> AllowedRoles, bool AllowsAnonymous, string? Scope)
{
    /// <summary>Anybody, signed in or not.</summary>
    public static RoleRule Anyone { get; } = new("anyone", [], true, Actors.Scope.Read);

    /// <summary>Anybody signed in, whatever the role: reading what the department decided.</summary>
    public static RoleRule SignedIn { get; } = new("signed in", [], false, Actors.Scope.Read);

    /// <summary>Anybody signed in with a session, about their own account.</summary>
    public static RoleRule Own { get; } = new("own account", [], false, null);

    /// <summary>Those who may propose an edit.</summary>
    public static RoleRule Propose { get; } = new(
        "propose", [Roles.Technologist, Roles.LeadTechnologist, Roles.Physicist, Roles.Radiologist], false, Actors.Scope.Propose);

    /// <summary>Anybody with a session and a signing key; which role or deputy may sign is a rule of the document.</summary>
    public static RoleRule Sign { get; } = new(
        "sign", [], false, null);

    /// <summary>Those who may decline a request.</summary>
    public static RoleRule Decline { get; } = new("decline", [Roles.Physicist, Roles.Radiologist], false, null);

    /// <summary>Those who say what runs where.</summary>
    public static RoleRule Release { get; } = new("release", [Roles.LeadTechnologist, Roles.Physicist], false, null);

    /// <summary>Those who enter versions at a console and check them there.</summary>
    public static RoleRule Load { get; } = new("load", [Roles.Technologist, Roles.LeadTechnologist, Roles.Physicist], false, null);

    /// <summary>Those who may start a regression run by hand.</summary>
    public static RoleRule StartRun { get; } = new("start a run", [Roles.Physicist, Roles.LeadTechnologist], false, Actors.Scope.Propose);

    /// <summary>Those who read the audit trail.</summary>
    public static RoleRule ReadAudit { get; } = new("read the audit trail", [Roles.Reviewer, Roles.Administrator, Roles.Physicist], false, Actors.Scope.Read);

    /// <summary>Those who export bundles.</summary>
    public static RoleRule Export { get; } = new(
        "export", [Roles.Reviewer, Roles.Physicist, Roles.LeadTechnologist, Roles.Administrator], false, Actors.Scope.Read);

    /// <summary>Those who keep accounts.</summary>
    public static RoleRule KeepAccounts { get; } = new("keep accounts", [Roles.Administrator], false, null);

    /// <summary>The program itself, and nobody over the network.</summary>
    public static RoleRule SystemOnly { get; } = new("the program itself", [], false, null);

    /// <summary>True when <paramref name="actor"/> may.</summary>
    /// <param name="actor">Who asks.</param>
    public bool Allows(Actor actor)
    {
        ArgumentNullException.ThrowIfNull(actor);
        return actor.Credential switch
        {
            Credential.None => AllowsAnonymous,
            Credential.System => true,
            Credential.Token when Scope is null || actor.Scopes?.Contains(Scope) != true => false,
            _ => !ReferenceEquals(this, SystemOnly) && (AllowedRoles.Count == 0 || AllowedRoles.Any(actor.Roles.Contains)),
        };
    }
}

/// <summary>Scopes of API tokens.</summary>
public static class Scope
{
    /// <summary>Read what any signed-in person reads.</summary>
    public const string Read = "read";

    /// <summary>Propose and submit edits, start runs.</summary>
    public const string Propose = "propose";

    /// <summary>All of them.</summary>
    public static IReadOnlyList<string> All { get; } = [Read, Propose];
}
