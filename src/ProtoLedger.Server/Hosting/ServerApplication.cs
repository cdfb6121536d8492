using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.FileProviders;
using Microsoft.Extensions.Options;
using ProtoLedger.Application;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Site;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Server.Features.Accounts;
using ProtoLedger.Server.Features.Audit;
using ProtoLedger.Server.Features.Bundles;
using ProtoLedger.Server.Features.ChangeRequests;
using ProtoLedger.Server.Features.Documentation;
using ProtoLedger.Server.Features.Documents;
using ProtoLedger.Server.Features.Health;
using ProtoLedger.Server.Features.Ledger;
using ProtoLedger.Server.Features.Predictions;
using ProtoLedger.Server.Features.Repairs;
using ProtoLedger.Server.Features.Runs;
using ProtoLedger.Server.Features.Sessions;
using ProtoLedger.Server.Http;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Server.Hosting;

/// <summary>Puts the server together.</summary>
internal static class ServerApplication
{
    private const string WebUrl = "http://127.0.0.1:5080";
    private const string WorkerUrl = "http://127.0.0.1:5081";

    private static readonly Dictionary<string, string> Switches = new()
    {
        ["--store"] = $"{ServerOptions.Section}:{nameof(ServerOptions.Store)}",
        ["--role"] = $"{ServerOptions.Section}:{nameof(ServerOptions.Role)}",
    };

    /// <summary>A builder with the settings read; the database is not touched yet.</summary>
    public static WebApplicationBuilder CreateBuilder(string[] args)
    {
        var builder = WebApplication.CreateBuilder(new WebApplicationOptions
        {
            // Named, since pages are looked for in this assembly; in tests another program is the one that was started.
            ApplicationName = typeof(ServerApplication).Assembly.GetName().Name,
            ContentRootPath = AppContext.BaseDirectory,
        });
        builder.Configuration.AddCommandLine(args, Switches);
        builder.Services.AddOptions<ServerOptions>().BindConfiguration(ServerOptions.Section).ValidateDataAnnotations().ValidateOnStart();
        if (builder.Configuration["urls"] is null && builder.Configuration["http_ports"] is null)
            builder.WebHost.UseUrls(builder.Configuration[Switches["--role"]] == "worker" ? WorkerUrl : WebUrl);
        builder.WebHost.ConfigureKestrel(kestrel =>
        {
            kestrel.AddServerHeader = false;
            kestrel.Limits.MaxRequestBodySize = CanonicalJson.MaximumBytes;
        });
        builder.Logging.AddFilter("Microsoft.AspNetCore", LogLevel.Warning);
        builder.Logging.AddFilter("Microsoft.Hosting.Lifetime", LogLevel.Warning);
        // The keys of forms lie in the data folder beside the sealing key, under the same protection.
        builder.Logging.AddFilter("Microsoft.AspNetCore.DataProtection", LogLevel.Error);
        builder.Logging.AddSimpleConsole(console => console.SingleLine = true);
        return builder;
    }

    /// <summary>The settings, checked.</summary>
    /// <exception cref="OptionsValidationException">A setting is not valid; the message names it.</exception>
    public static ServerOptions ReadOptions(WebApplicationBuilder builder)
    {
        using var provider = builder.Services.BuildServiceProvider();
        return provider.GetRequiredService<IOptions<ServerOptions>>().Value;
    }

    /// <summary>The application over a database, not started.</summary>
    public static WebApplication Build(WebApplicationBuilder builder, ServerOptions options, DatabaseAccess database)
    {
        var services = builder.Services;
        services.AddSingleton(database);
        services.TryAddSingleton(TimeProvider.System);
        services.AddSingleton<Readiness>();
        services.AddProtoLedgerStorage(database.ConnectionString);
        services.AddProtoLedgerApplication(
            new SiteOptions(options.SiteName, options.Origin, SealingKeyFile.Read(options.SealingKeyFile ?? Path.Combine(options.DataFolder, SealingKeyFile.UsualName))),
            AccountOptions.Default with { DemoAccounts = options.ShowsDemo(database) });
        services.AddSingleton(options);
        services.AddSingleton<FirstStart>();
        services.AddSingleton<DemoPeople>();
        services.AddHostedService<ClusterGuard>();
        if (options.Works)
            services.AddHostedService<RunService>();
        services.AddScoped<CurrentCaller>();
        services.AddScoped(provider => provider.GetRequiredService<CurrentCaller>().Caller);
        services.ConfigureHttpJsonOptions(json => JsonSettings.Apply(json.SerializerOptions));
        services.AddExceptionHandler<ProblemExceptionHandler>();
        services.AddProblemDetails();
        services.AddApiDescription();
        services.AddPages(options);

        var app = builder.Build();
        app.UseMiddleware<SecurityHeaders>();
        app.UseExceptionHandler();
        app.UseStatusCodePages(context => MessagePage.Fits(context.HttpContext)
            ? MessagePage.WriteAsync(context.HttpContext)
            : Problems.ForStatus(context.HttpContext.Response.StatusCode, context.HttpContext.Request.Path).ExecuteAsync(context.HttpContext));
        app.UseStaticFiles(new StaticFileOptions { FileProvider = new PhysicalFileProvider(Path.Combine(AppContext.BaseDirectory, "wwwroot")) });
        app.UseRouting();
        app.UseMiddleware<RoleGate>();
        app.MapHealth();
        if (options.ServesWeb)
        {
            app.MapSessions();
            app.MapPredictions();
            app.MapRepairs();
            app.MapChangeRequests();
            app.MapReports();
            app.MapDocuments();
            app.MapLoadings();
            app.MapRuns();
            app.MapRunEvents();
            app.MapLedger();
            app.MapAudit();
            app.MapAccounts();
            app.MapOwnAccount();
            app.MapBundles();
            app.MapApiDescription();
            app.MapProblemPages();
            app.MapPages();
        }

        return app;
    }
}
