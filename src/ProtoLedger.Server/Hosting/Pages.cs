using Microsoft.AspNetCore.DataProtection;
using Microsoft.AspNetCore.Mvc.RazorPages;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Hosting;

/// <summary>Pages for people: Razor pages beside the endpoints of their feature.</summary>
internal static class Pages
{
    private const string Root = "/Features";

    public static void AddPages(this IServiceCollection services, ServerOptions options)
    {
        services.AddRazorPages(pages => pages.RootDirectory = Root);
        services.AddAntiforgery(forms =>
        {
            // Not bound to https as the session's cookie is: the platform refuses to make a form on plain loopback then.
            forms.Cookie.Name = "protoledger-form";
            forms.Cookie.SecurePolicy = CookieSecurePolicy.SameAsRequest;
            forms.Cookie.SameSite = SameSiteMode.Strict;
            forms.FormFieldName = "formToken";
        });
        services.AddDataProtection().SetApplicationName("ProtoLedger")
            .PersistKeysToFileSystem(new DirectoryInfo(Path.Combine(options.DataFolder, "form-keys")));
    }

    /// <summary>Every page model states its rule in a static property <c>Rule</c>; one that states none lets nobody pass.</summary>
    public static void MapPages(this IEndpointRouteBuilder routes) =>
        routes.MapRazorPages().Add(endpoint =>
        {
            var page = endpoint.Metadata.OfType<PageActionDescriptor>().Single();
            endpoint.Metadata.Add(PageRoute.Instance);
            if (RuleOf(page) is { } rule)
                endpoint.Metadata.Add(rule);
        });

    /// <summary>/Features/Documents/Sheet.cshtml belongs to ProtoLedger.Server.Features.Documents.SheetModel.</summary>
    private static RoleRule? RuleOf(PageActionDescriptor page)
    {
        var name = page.RelativePath[1..^".cshtml".Length].Replace('/', '.');
        return typeof(Pages).Assembly.GetType($"ProtoLedger.Server.{name}Model")?.GetProperty("Rule")?.GetValue(null) as RoleRule;
    }
}
