using System.Diagnostics.CodeAnalysis;

namespace ProtoLedger.Server.Hosting;

/// <summary>A start that cannot go on; the message says what to mend.</summary>
[SuppressMessage("Design", "CA1032", Justification = "Without a message it has no meaning.")]
internal sealed class StartupException(string message) : Exception(message);
