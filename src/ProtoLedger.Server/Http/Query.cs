using System.Globalization;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Server.Http;

/// <summary>Reads parameters of an address by hand, so that every fault is named in the same way as those of bodies.</summary>
internal sealed class Query
{
    private readonly List<FieldError> errors = [];

    /// <summary>A whole number within limits, or null where the parameter is missing.</summary>
    public long? Number(string name, string? text, long low, long high)
    {
        if (text is null)
            return null;
        if (long.TryParse(text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out var number) && number >= low && number <= high)
            return number;
        Add(name, text, string.Create(CultureInfo.InvariantCulture, $"a whole number, {low} to {high}"));
        return null;
    }

    /// <summary>A whole number that must be there.</summary>
    public long RequiredNumber(string name, string? text, long low, long high)
    {
        if (text is null)
            Add(name, null, string.Create(CultureInfo.InvariantCulture, $"a whole number, {low} to {high}"));
        return Number(name, text, low, high) ?? low;
    }

    /// <summary>A text that must be there.</summary>
    public string RequiredText(string name, string? text, int most = 400)
    {
        if (string.IsNullOrEmpty(text) || text.Length > most || text.Any(char.IsControl))
            Add(name, text, $"1 to {most} characters");
        return text ?? "";
    }

    /// <summary>One of some words, or null where the parameter is missing.</summary>
    public T? OneOf<T>(string name, string? text, IReadOnlyList<string> words, Func<string, T?> read)
        where T : struct
    {
        if (text is null)
            return null;
        if (words.Contains(text))
            return read(text);
        Add(name, text, "one of " + string.Join(", ", words));
        return null;
    }

    /// <summary>A point in time with an offset, or null where the parameter is missing.</summary>
    public DateTime? Time(string name, string? text)
    {
        if (text is null)
            return null;
        // A plus sign that was not escaped arrives as a blank.
        if (Times.TryParse(text.Replace(' ', '+'), out var time))
            return time;
        Add(name, text, "a time such as 2030-01-31T08:00:00Z (RFC 3339, with offset)");
        return null;
    }

    /// <summary>Ends the request where a parameter was at fault.</summary>
    /// <exception cref="ProblemException">A parameter was at fault.</exception>
    public void Demand()
    {
        if (errors.Count > 0)
            throw new ProblemException(Problems.Malformed($"{errors.Count} parameter(s) of the address cannot be read.", errors));
    }

    private void Add(string name, string? value, string limit) =>
        errors.Add(new FieldError("/" + name, value is { Length: > 80 } ? value[..80] + "…" : value, limit, $"The parameter \"{name}\" must be {limit}."));
}
