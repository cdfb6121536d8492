using System.Globalization;
using System.Text.Json;
using System.Text.Json.Nodes;
using Microsoft.AspNetCore.Mvc;
using Microsoft.AspNetCore.Mvc.RazorPages;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Server.Features.Documents;
using ProtoLedger.Server.Features.Shared;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.ChangeRequests;

/// <summary>A form with every value of a version; what was typed is kept when it is refused.</summary>
internal sealed class ProposeModel(ReadDocuments read, CreateChangeRequest create, SubmitChangeRequest submit) : LedgerPage
{
    private IReadOnlyList<FieldError> errors = [];
    private IReadOnlyDictionary<string, string> typed = new Dictionary<string, string>();

    public static RoleRule Rule => CreateChangeRequest.Rule;

    public string Folder { get; private set; } = "";

    public DocumentKey Key { get; private set; }

    public string Title { get; private set; } = "";

    public int BaseVersion { get; private set; }

    public string? Reason { get; private set; }

    public string? Yaml { get; private set; }

    /// <summary>T of the first scanner, for the prediction while typing.</summary>
    public double? FieldStrength { get; private set; }

    /// <summary>Tissues shown while typing.</summary>
    public string Tissues { get; private set; } = "";

    public IReadOnlyList<FieldGroup> Groups { get; private set; } = [];

    /// <summary>Errors that belong to no field of the form.</summary>
    public IReadOnlyList<FieldError> Loose =>
        [.. errors.Where(error => !Groups.SelectMany(group => group.Fields).Any(shown => shown.Pointer == error.Pointer))];

    public FieldError? ErrorAt(string pointer) => errors.FirstOrDefault(error => error.Pointer == pointer);

    /// <summary>The form; <paramref name="set"/> brings values such as <c>/series/0/readout/RepetitionTime=6000</c>.</summary>
    public async Task<IActionResult> OnGetAsync(string folder, string id, string[] set, string? reason)
    {
        Reason = reason;
        typed = set.Select(text => text.Split('=', 2)).Where(parts => parts.Length == 2)
            .GroupBy(parts => parts[0]).ToDictionary(parts => parts.Key, parts => parts.Last()[1]);
        return await LoadAsync(folder, id, null) is { } absent ? absent : Page();
    }

    public async Task<IActionResult> OnPostAsync(
        string folder, string id, int baseVersion, string[] pointer, string?[] value, string? yaml, string? reason, string? then, string? formKey)
    {
        (Reason, Yaml) = (reason, string.IsNullOrWhiteSpace(yaml) ? null : yaml);
        typed = pointer.Zip(value).GroupBy(pair => pair.First).ToDictionary(pairs => pairs.Key, pairs => pairs.Last().Second ?? ""); // The platform binds an empty field as null.
        if (await LoadAsync(folder, id, baseVersion) is { } absent)
            return absent;
        var read = Yaml is null ? Edited() : DocumentReader.ReadYaml(Yaml, Key.Kind);
        if (read is not ParseResult.Parsed parsed)
        {
            errors = [.. ((ParseResult.Refused)read).Errors.Select(error => new FieldError(error.Pointer, error.Value, error.Limit ?? "", error.Detail))];
            return Invalid();
        }

        var made = await create.RunAsync(Sender(formKey), new NewChangeRequest(Key.Kind, Key.Id, baseVersion, parsed.CanonicalBytes, reason), Cancellation);
        if (!made.Succeeded)
        {
            errors = made.Refusal is Invalid invalid ? invalid.Errors : [];
            return errors.Count > 0 ? Invalid() : Refuse(made.Refusal);
        }

        if (then == "submit")
            await submit.RunAsync(Sender(formKey + "-submit"), new ChangeRequestStep(made.Value.Id, made.Value.RowVersion), Cancellation);
        return LocalRedirect($"/requests/{made.Value.Id}");
    }

    private PageResult Invalid() => Refuse(new Invalid("The proposal is not valid. Every problem stands beside its field, or in the column on the right.", []));

    private byte[] stored = [];

    private async Task<IActionResult?> LoadAsync(string folder, string id, int? version)
    {
        (Folder, Key) = (folder, Folders.Key(folder, id));
        var found = await read.VersionAsync(Caller, Key, version, Cancellation);
        if (!found.Succeeded)
            return Absent(found.Refusal);
        stored = found.Value.Bytes;
        (BaseVersion, Title) = (found.Value.Summary.Version, found.Value.Document.Title);
        if (found.Value.Document is ProtocolDocument protocol
            && await read.VersionAsync(Caller, new DocumentKey(DocumentKind.Scanner, protocol.Scanners[0]), null, Cancellation) is { Succeeded: true, Value.Document: ScannerDocument scanner })
        {
            FieldStrength = scanner.MagneticFieldStrength;
            Tissues = await TissuesAsync(protocol.Id);
        }

        var tree = JsonNode.Parse(stored)!;
        // The series of a protocol come before its text: they are what is edited most.
        Groups = [.. DocumentRows.Of(Key.Kind, stored).OrderBy(group => Key.Kind == DocumentKind.Protocol && group.Pointer.Length == 0).Select(group => new FieldGroup(
            group.Title,
            group.Pointer.StartsWith("/series/", StringComparison.Ordinal) ? tree["series"]![int.Parse(group.Pointer["/series/".Length..], CultureInfo.InvariantCulture)]!.ToJsonString() : null,
            [.. group.Rows.Where(row => !row.Pointer.EndsWith("/kind", StringComparison.Ordinal)).Select(Field)]))];
        return null;
    }

    /// <summary>Tissues that the protocol's expectations name.</summary>
    private async Task<string> TissuesAsync(string protocol)
    {
        var listed = await read.ListAsync(Caller, DocumentKind.Expectations, null, 200, Cancellation);
        foreach (var summary in listed.Value ?? [])
        {
            if (await read.VersionAsync(Caller, new DocumentKey(DocumentKind.Expectations, summary.Id), null, Cancellation)
                is { Succeeded: true, Value.Document: ExpectationsDocument document } && document.Protocol == protocol)
            {
                return string.Join(' ', document.Expectations
                    .SelectMany(expectation => new[] { expectation.Observable.Tissue, expectation.Observable.Reference }).OfType<string>().Distinct());
            }
        }

        return "";
    }

    private FormField Field(DocumentRow row) => new(
        row.Pointer, row.Block, Show.Sentence(row.Label), row.Unit, row.Parameter?.IsNumber == true, row.Parameter?.Low, row.Parameter?.High, row.Parameter?.Words ?? [], row.Value.Length > 40, row.Value,
        typed.GetValueOrDefault(row.Pointer, row.Value));

    private ParseResult Edited()
    {
        var tree = JsonNode.Parse(stored)!;
        var wrong = new List<DocumentError>();
        var settings = new List<Protocols.Comparison.ParameterSetting>();
        foreach (var field in Groups.SelectMany(group => group.Fields).Where(field => field.Typed.ReplaceLineEndings("\n") != field.Stored.ReplaceLineEndings("\n")))
        {
            if (Protocols.Canonical.JsonPointer.TryFind(tree, field.Pointer, out var present) && Value(field.Typed, present) is { } value)
                settings.Add(new Protocols.Comparison.ParameterSetting(field.Pointer, value));
            else
                wrong.Add(new DocumentError(field.Pointer, field.Typed, "a number with a point, such as 9000 or 9.5; a list is separated by commas", "This is not a number."));
        }

        return wrong.Count > 0 ? new ParseResult.Refused(wrong) : ParameterEdit.Apply(stored, settings);
    }

    /// <summary>What was typed, in the type of what stands there; null where it cannot be read so.</summary>
    private static JsonNode? Value(string text, JsonNode? present) => present switch
    {
        JsonArray list => List(text, list),
        JsonValue value when value.GetValueKind() == JsonValueKind.Number => Number(text),
        JsonValue value when value.GetValueKind() is JsonValueKind.True or JsonValueKind.False => text is "true" or "false" ? JsonValue.Create(text == "true") : null,
        _ => JsonValue.Create(text.ReplaceLineEndings("\n").Trim()),
    };

    private static JsonValue? Number(string text) =>
        double.TryParse(text.Trim(), NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent, CultureInfo.InvariantCulture, out var number)
        && double.IsFinite(number) ? JsonValue.Create(number) : null;

    private static JsonArray? List(string text, JsonArray present)
    {
        var items = text.Split(',', StringSplitOptions.TrimEntries | StringSplitOptions.RemoveEmptyEntries)
            .Select(item => Value(item, present.Count > 0 ? present[0] : JsonValue.Create(""))).ToArray();
        return items.Contains(null) ? null : new JsonArray(items);
    }
}

/// <summary>Fields under one heading; the JSON of the series where it is one.</summary>
internal sealed record FieldGroup(string Title, string? Series, IReadOnlyList<FormField> Fields);

/// <summary>A field of the form.</summary>
internal sealed record FormField(
    string Pointer, string Block, string Label, string? Unit, bool Number, double? Low, double? High, IReadOnlyList<string> Words, bool Long, string Stored, string Typed);
