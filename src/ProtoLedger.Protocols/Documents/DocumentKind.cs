namespace ProtoLedger.Protocols.Documents;

/// <summary>The five kinds of versioned document on which predictions depend. All go through the same change request.</summary>
public enum DocumentKind
{
    /// <summary>A named set of series for one kind of exam.</summary>
    Protocol,

    /// <summary>Field, pulses, limits and console wording of one scanner.</summary>
    Scanner,

    /// <summary>Ranges of off-resonance and B1+ scale for a body region.</summary>
    Conditions,

    /// <summary>Tissue values with their sources.</summary>
    Catalogue,

    /// <summary>Written limits on predicted numbers.</summary>
    Expectations,
}
