using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.ChangeRequests;

/// <summary>Stored bytes of a request: reports, manifests, signatures. They are sent as they were signed.</summary>
internal static class ReportEndpoints
{
    internal static IEndpointRouteBuilder MapReports(this IEndpointRouteBuilder routes)
    {
        var group = routes.MapGroup("/api/v1/change-requests/{id:long}").WithTags("Reports and signatures");
        MapForm(group, "report", "GetReport", ReportForm.Json, "application/json", "The change report as JSON");
        MapForm(group, "report.json", "GetReportJson", ReportForm.Json, "application/json", "The change report as JSON");
        MapForm(group, "report.md", "GetReportMarkdown", ReportForm.Markdown, "text/markdown; charset=utf-8", "The change report as Markdown");
        MapForm(group, "report.html", "GetReportHtml", ReportForm.Html, "text/html; charset=utf-8", "The change report as HTML")
            // The page carries its own style and drawings, and runs nothing.
            .WithMetadata(new ContentPolicy("default-src 'none'; style-src 'unsafe-inline'; img-src data:; base-uri 'none'; form-action 'none'; frame-ancestors 'self'"));
        MapForm(group, "inputs.json", "GetReportInputs", ReportForm.Inputs, "application/json", "Every document that the report depends on, with its hash");
        group.MapGet("/signatures/{number:int}.p7s", SignatureAsync).WithName("GetSignature").WithSummary("A signature: detached CMS in DER over manifest.json")
            .Needs(ReadChangeRequests.Rule).Produces(StatusCodes.Status200OK, contentType: "application/pkcs7-signature").Refuses(Problems.Missing);
        group.MapGet("/signatures/{number:int}/manifest.json", ManifestOfAsync).WithName("GetSignedManifest").WithSummary("What that signature signed")
            .Needs(ReadChangeRequests.Rule).Produces(StatusCodes.Status200OK, contentType: "application/json").Refuses(Problems.Missing);
        group.MapGet("/manifest.json", NewestManifestAsync).WithName("GetManifest").WithSummary("What the newest signature signed")
            .Needs(ReadChangeRequests.Rule).Produces(StatusCodes.Status200OK, contentType: "application/json").Refuses(Problems.Missing);
        return routes;
    }

    private static RouteHandlerBuilder MapForm(RouteGroupBuilder group, string path, string name, ReportForm form, string type, string summary) =>
        group.MapGet("/" + path, async (Caller caller, ReadChangeRequests useCase, long id, CancellationToken cancellationToken) =>
            {
                var report = await useCase.ReportAsync(caller, id, form, cancellationToken);
                return report.Succeeded ? TypedResults.Bytes(report.Value, type) : (IResult)Problems.From(report.Refusal);
            })
            .WithName(name).WithSummary(summary).Needs(ReadChangeRequests.Rule)
            .Produces(StatusCodes.Status200OK, contentType: type).Refuses(Problems.Missing, Problems.StillComputing);

    private static Task<IResult> SignatureAsync(Caller caller, ReadChangeRequests useCase, long id, int number, CancellationToken cancellationToken) =>
        SendAsync(caller, useCase, id, number, files => TypedResults.Bytes(files.Cms, "application/pkcs7-signature"), cancellationToken);

    private static Task<IResult> ManifestOfAsync(Caller caller, ReadChangeRequests useCase, long id, int number, CancellationToken cancellationToken) =>
        SendAsync(caller, useCase, id, number, files => TypedResults.Bytes(files.Manifest, "application/json"), cancellationToken);

    private static Task<IResult> NewestManifestAsync(Caller caller, ReadChangeRequests useCase, long id, CancellationToken cancellationToken) =>
        SendAsync(caller, useCase, id, null, files => TypedResults.Bytes(files.Manifest, "application/json"), cancellationToken);

    private static async Task<IResult> SendAsync(
        Caller caller, ReadChangeRequests useCase, long id, int? number, Func<SignatureFiles, IResult> send, CancellationToken cancellationToken)
    {
        var files = await useCase.SignatureAsync(caller, id, number, cancellationToken);
        return files.Succeeded ? send(files.Value) : Problems.From(files.Refusal);
    }
}
