namespace ProtoLedger.Reports;

/// <summary>A report in its three forms, UTF-8 without a byte order mark, lines ended by a line feed.</summary>
/// <param name="Json">The model, complete.</param>
/// <param name="Markdown">The words: source of the HTML.</param>
/// <param name="Html">Self-contained page without script.</param>
public sealed record RenderedReport(byte[] Json, byte[] Markdown, byte[] Html);
