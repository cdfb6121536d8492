using System.Globalization;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Repair;

/// <summary>Sets parameters of one series of a stored protocol; the outcome is read and validated as any document.</summary>
internal static class SeriesEdit
{
    internal static HashedDocument<ProtocolDocument>? Apply(HashedDocument<ProtocolDocument> protocol, string series, IEnumerable<(string Pointer, double Value)> settings)
    {
        var index = IndexOf(protocol.Document, series);
        var edits = settings.Select(s => new ParameterSetting($"/series/{index.ToString(CultureInfo.InvariantCulture)}{s.Pointer}", JsonValue.Create(s.Value)));
        return ParameterEdit.Apply(protocol.CanonicalBytes, edits) is ParseResult.Parsed parsed ? HashedDocument.From<ProtocolDocument>(parsed) : null;
    }

    internal static double? Get(ProtocolDocument protocol, string series, string pointer) =>
        protocol.Series.FirstOrDefault(s => s.Id == series) is { } found ? SeriesParameters.Get(found.Acquisition, pointer) : null;

    private static int IndexOf(ProtocolDocument protocol, string series)
    {
        for (var i = 0; i < protocol.Series.Count; i++)
        {
            if (protocol.Series[i].Id == series)
                return i;
        }

        throw new ArgumentException($"The protocol has no series \"{series}\".", nameof(series));
    }
}
