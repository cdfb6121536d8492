using System.Collections.Concurrent;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Attribution;

/// <summary>Two inputs and every difference between their documents, from which any mixture of the two can be made.</summary>
internal sealed class EditedInput
{
    private readonly Dictionary<DocumentKind, (DocumentDifference Difference, string Name)> differences = [];
    private readonly ConcurrentDictionary<string, LedgerDocument?> mixtures;

    /// <param name="before">The state before.</param>
    /// <param name="after">The state after.</param>
    /// <param name="mixtures">Mixtures made so far in this run: an edited catalogue is mixed alike for many series and scanners.</param>
    internal EditedInput(EvaluationInput before, EvaluationInput after, ConcurrentDictionary<string, LedgerDocument?> mixtures)
    {
        (Before, After, this.mixtures) = (before, after, mixtures);
        var changes = new List<ChangedParameter>();
        void Add<T>(HashedDocument<T>? old, HashedDocument<T>? now)
            where T : LedgerDocument
        {
            if (old is null || now is null || old.Sha256 == now.Sha256)
                return;
            var difference = DocumentDifference.Between(old.CanonicalBytes, now.CanonicalBytes);
            differences[now.Document.Kind] = (difference, $"{old.Sha256} {now.Sha256}");
            changes.AddRange(difference.Changes.Select(change => new ChangedParameter(now.Document.Kind, now.Document.Id, change)));
        }

        Add(before.Protocol, after.Protocol);
        Add(before.Scanner, after.Scanner);
        Add(before.Conditions, after.Conditions);
        Add(before.Catalogue, after.Catalogue);
        Add(before.Expectations, after.Expectations);
        Changes = changes;
    }

    internal EvaluationInput Before { get; }

    internal EvaluationInput After { get; }

    /// <summary>Every difference, document by document.</summary>
    internal IReadOnlyList<ChangedParameter> Changes { get; }

    /// <summary>The input with some of the changes taken over from the new one; null where these are not valid apart from the others.</summary>
    /// <param name="taken">Positions in <see cref="Changes"/>.</param>
    internal EvaluationInput? Mix(IReadOnlySet<int> taken)
    {
        if (taken.Count == Changes.Count)
            return After;
        var (protocol, scanner) = (Mix(Before.Protocol, taken), Mix(Before.Scanner, taken));
        var (conditions, catalogue) = (Mix(Before.Conditions, taken), Mix(Before.Catalogue, taken));
        return protocol is null || scanner is null || conditions is null || catalogue is null
            ? null
            : After with { Protocol = protocol, Scanner = scanner, Conditions = conditions, Catalogue = catalogue };
    }

    private HashedDocument<T>? Mix<T>(HashedDocument<T> old, IReadOnlySet<int> taken)
        where T : LedgerDocument
    {
        if (!differences.TryGetValue(old.Document.Kind, out var difference))
            return old;
        var own = new SortedSet<int>();
        for (var i = 0; i < Changes.Count; i++)
        {
            if (Changes[i].Document == old.Document.Kind && taken.Contains(i))
                own.Add(Changes[i].Change.Index);
        }

        var name = $"{difference.Name} {string.Join(',', own)}";
        var mixed = mixtures.GetOrAdd(name, _ => difference.Difference.Hybrid(own) is ParseResult.Parsed parsed ? parsed.Document : null);
        // The name stands for the bytes: a mixture is only predicted, never stored or compared.
        return mixed is T document ? new(document, name, []) : null;
    }
}
