namespace ProtoLedger.Reports.Pictures;

/// <summary>A tissue of a phantom.</summary>
/// <param name="Name">Catalogue name.</param>
/// <param name="Substitutes">Catalogue names of tissues that may be drawn for it where nothing is predicted for it, the nearest first; without one it stays black.</param>
public sealed record PhantomTissue(string Name, params IReadOnlyList<string> Substitutes)
{
    /// <summary>The names in the order in which they are looked for.</summary>
    public IEnumerable<string> Candidates => Substitutes.Prepend(Name);
}
