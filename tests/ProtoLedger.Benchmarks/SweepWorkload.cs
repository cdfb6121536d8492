using System.Buffers.Binary;
using System.Runtime.InteropServices;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Benchmarks;

/// <summary>Random inversion-recovery echo trains, each for six tissues and nine B1+ scales; lane order version, tissue, scale.</summary>
/// <remarks>
/// File: little endian; int32 number of versions, int32 6, then rows of six doubles: TR ms, TI ms, train length, echo spacing ms, refocusing angle
/// degrees, field T. Inversion 180° and excitation 90°, both scaled by B1+; the signal is that of echo number (train length / 2), counted from 1.
/// </remarks>
internal sealed class SweepWorkload
{
    private const int Columns = 6;

    private static readonly double[] B1Scales = [0.7, 0.775, 0.85, 0.925, 1.0, 1.075, 1.15, 1.225, 1.3];

    private readonly PredictionRequest[] _requests;
    private readonly int _lanesPerVersion;
    private readonly int[] _order;

    private SweepWorkload(PredictionRequest[] requests)
    {
        (_requests, _lanesPerVersion) = (requests, requests[0].Lanes.Count);

        // Trains of one length one after the other, so that the machine's branch prediction sees a pattern; the file's order is kept in the result.
        _order = [.. Enumerable.Range(0, requests.Length).OrderBy(i => ((EchoTrain)requests[i].Series.Readout).EchoTrainLength)];
    }

    internal int LaneCount => _requests.Sum(r => r.Lanes.Count);

    internal static SweepWorkload Read(string path)
    {
        var bytes = File.ReadAllBytes(path);
        var count = BinaryPrimitives.ReadInt32LittleEndian(bytes);
        if (BinaryPrimitives.ReadInt32LittleEndian(bytes.AsSpan(4)) != Columns || bytes.Length != 8 + count * Columns * sizeof(double))
            throw new InvalidDataException($"{path}: not {count} rows of {Columns} doubles.");
        var rows = MemoryMarshal.Cast<byte, double>(bytes.AsSpan(8));
        var lanes15 = Lanes((600, 80, 0.70), (950, 100, 0.80), (4200, 2000, 1.0), (260, 85, 0.95), (1300, 150, 0.85), (900, 50, 0.75));
        var lanes30 = Lanes((830, 75, 0.70), (1330, 95, 0.80), (4300, 2000, 1.0), (380, 70, 0.95), (1600, 140, 0.85), (1300, 40, 0.75));
        var requests = new PredictionRequest[count];
        for (var i = 0; i < count; i++)
        {
            var row = rows.Slice(i * Columns, Columns);
            var (repetition, inversion, length, spacing, angle, field) = (row[0], row[1], (int)row[2], row[3], row[4], row[5]);
            var series = new Series(
                [new Inversion(inversion, InversionTimeEnd.Excitation, new HardPulse("hard", 180))],
                new EchoTrain(repetition, length / 2 * spacing, 90, spacing, length, [angle]),
                new SeriesTiming(),
                new SeriesGeometry());
            requests[i] = new PredictionRequest(series, new PredictionSetting(field, PulseModelling.Ideal), field < 2 ? lanes15 : lanes30);
        }

        return new SweepWorkload(requests);
    }

    internal void Run(bool pruned, int threads, double[] signals)
    {
        var next = 0;
        if (threads == 1)
            Work();
        else
            Parallel.For(0, threads, new ParallelOptions { MaxDegreeOfParallelism = threads }, _ => Work());

        // Portions drawn from one counter: trains differ in length.
        void Work()
        {
            const int Portion = 16;
            var table = new SignalTable(_lanesPerVersion);
            for (var start = Interlocked.Add(ref next, Portion) - Portion; start < _requests.Length; start = Interlocked.Add(ref next, Portion) - Portion)
            {
                for (var i = start; i < Math.Min(start + Portion, _requests.Length); i++)
                {
                    var request = _requests[_order[i]];
                    if (pruned)
                        SignalPredictor.PredictInto(request.Series, request.Setting, request.Lanes, table);
                    else
                        table = SignalPredictor.Compute(request.Series, request.Setting, request.Lanes, request.Outputs, pruned, LaneWidth.Machine);
                    table.Signed.CopyTo(signals, _order[i] * _lanesPerVersion);
                }
            }
        }
    }

    private static LaneTable Lanes(params (double T1, double T2, double ProtonDensity)[] tissues) => LaneTable.FromGrid(
        [.. tissues.Select((t, i) => new Tissue($"tissue {i}", t.T1, t.T2, null, t.ProtonDensity))],
        [.. B1Scales.Select(scale => new FieldPoint(scale))]);
}
