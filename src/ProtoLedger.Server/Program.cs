var builder = WebApplication.CreateBuilder(args);
var app = builder.Build();
app.MapGet("/health/live", () => TypedResults.Text("live"));
await app.RunAsync();
