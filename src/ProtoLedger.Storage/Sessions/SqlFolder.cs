using System.Collections.Concurrent;
using System.Reflection;

namespace ProtoLedger.Storage.Sessions;

/// <summary>The statements of one area, read from <c>Sql/Area/Operation.sql</c> inside the assembly.</summary>
internal sealed class SqlFolder(string area)
{
    private readonly ConcurrentDictionary<string, string> texts = new(StringComparer.Ordinal);

    /// <summary>Text of a statement.</summary>
    /// <exception cref="ArgumentException">There is no such file.</exception>
    public string this[string operation] => texts.GetOrAdd(operation, Read);

    /// <summary>Every statement: resource name and text.</summary>
    public static IEnumerable<(string Name, string Text)> All() =>
        Assembly.GetExecutingAssembly().GetManifestResourceNames()
            .Where(name => name.StartsWith("ProtoLedger.Storage.Sql.", StringComparison.Ordinal))
            .Select(name => (name, Text(name)));

    private string Read(string operation) => Text($"ProtoLedger.Storage.Sql.{area}.{operation}.sql");

    private static string Text(string name)
    {
        using var stream = Assembly.GetExecutingAssembly().GetManifestResourceStream(name)
            ?? throw new ArgumentException($"There is no statement {name}.", nameof(name));
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
