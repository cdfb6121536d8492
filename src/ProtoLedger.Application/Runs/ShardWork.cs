using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Application.Runs;

/// <summary>Predicts every version and proposal of one protocol on every scanner that it names.</summary>
internal static class ShardWork
{
    /// <summary>Rows, the lists that they refer to, and how many series predictions were shared by identical inputs.</summary>
    public static (IReadOnlyList<ResultRow> Rows, IReadOnlyList<byte[]> Lists, int Shared) Compute(
        long run, RunPlan plan, string protocol, RunDocuments documents, CancellationToken cancellationToken)
    {
        var subjects = plan.Subjects.Where(subject => subject.Protocol == protocol).ToList();
        var stored = subjects.Where(subject => subject.ChangeRequest == 0).ToDictionary(subject => subject.Version, subject => subject.Sha256);
        var evaluation = new VersionEvaluation();
        var rows = new List<ResultRow>();
        var lists = new Dictionary<string, byte[]>(StringComparer.Ordinal);
        foreach (var subject in subjects)
        {
            foreach (var scanner in documents.Protocol(subject.Sha256).Document.Scanners)
            {
                cancellationToken.ThrowIfCancellationRequested();
                var before = stored.TryGetValue(subject.Before, out var hash) ? documents.Input(hash, scanner) : null;
                var result = evaluation.Evaluate(documents.Input(subject.Sha256, scanner), before);
                var (row, list) = PackedResults.Pack(run, subject, scanner, result);
                rows.Add(row);
                lists[Convert.ToHexString(row.ObservablesSha256)] = list;
            }
        }

        return (rows, [.. lists.Values], evaluation.SharedSeries);
    }

    /// <summary>Loads what <see cref="Compute"/> needs.</summary>
    public static Task<RunDocuments> LoadAsync(
        IStores stores, DocumentShelf shelf, RunPlan plan, string protocol, CancellationToken cancellationToken) =>
        RunDocuments.LoadAsync(
            stores, shelf, plan, plan.Subjects.Where(subject => subject.Protocol == protocol), beforeEdit: false, cancellationToken);
}
