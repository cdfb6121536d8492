using System.Diagnostics.CodeAnalysis;

namespace ProtoLedger.Server.Http;

/// <summary>Carries a problem out of the binding of parameters, which cannot return one.</summary>
[SuppressMessage("Design", "CA1032", Justification = "Without a problem it has no meaning.")]
internal sealed class ProblemException(Problem problem) : Exception(problem.Detail)
{
    public Problem Problem { get; } = problem;
}
