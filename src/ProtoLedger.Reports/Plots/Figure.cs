namespace ProtoLedger.Reports.Plots;

/// <summary>A drawn plot with the same content as words and as a table.</summary>
/// <param name="Name">Lower-case letters, digits and hyphens; unique within a page, used for identifiers and file names.</param>
/// <param name="Title">What is shown.</param>
/// <param name="Text">What a reader who cannot see it should know.</param>
/// <param name="Svg">A complete <c>svg</c> element: no script, no style attribute, no outside reference.</param>
/// <param name="Twin">The numbers drawn.</param>
public sealed record Figure(string Name, string Title, string Text, string Svg, FigureTable Twin);

/// <summary>The numbers of a figure.</summary>
/// <param name="Headings">Column headings with units; one that starts with a blank is a column of numbers.</param>
/// <param name="Rows">As many cells each as there are headings.</param>
public sealed record FigureTable(IReadOnlyList<string> Headings, IReadOnlyList<IReadOnlyList<string>> Rows);
