using ProtoLedger.Application.Actors;

namespace ProtoLedger.Pages.Tests;

/// <summary>Every page, by the name of its picture.</summary>
internal static class Places
{
    /// <summary>Who stands for a role.</summary>
    public static IReadOnlyDictionary<string, string> People { get; } = new Dictionary<string, string>
    {
        [Roles.Technologist] = "t.okafor",
        [Roles.Physicist] = "h.lindqvist",
        [Roles.Reviewer] = "r.hallam",
        [Roles.Administrator] = "k.osei",
    };

    /// <summary>Pages that a role may open, with their addresses.</summary>
    /// <param name="role">Role.</param>
    /// <param name="request">A request with a report.</param>
    public static IEnumerable<(string Name, string Address)> Of(string role, long request)
    {
        (string, string)[] all =
        [
            ("today", "/"), ("protocols", "/protocols"), ("sheet", "/protocols/brain-standard"), ("history", "/protocols/brain-standard/history?from=1&to=2"),
            ("why", "/protocols/brain-standard/7/why?pointer=/series/0/preparations/0/InversionTime"), ("requests", "/requests"), ("request", $"/requests/{request}"),
            ("runs", "/runs"), ("run", "/runs/2"), ("compare", "/runs/compare?from=1&to=2"), ("effective", "/effective"), ("references", "/references"), ("catalogue", "/catalogues/tissues"),
        ];
        foreach (var page in all)
            yield return page;
        if (RoleOf(RoleRule.Propose, role))
            yield return ("propose", "/protocols/brain-standard/propose");
        if (RoleOf(RoleRule.ReadAudit, role))
            yield return ("audit", "/audit");
        if (RoleOf(RoleRule.KeepAccounts, role))
            yield return ("accounts", "/accounts");
    }

    private static bool RoleOf(RoleRule rule, string role) => rule.AllowedRoles.Contains(role);
}
