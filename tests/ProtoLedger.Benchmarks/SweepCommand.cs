using System.Diagnostics;
using System.Globalization;
using System.Runtime.InteropServices;
using System.Security.Cryptography;
using System.Text.Json;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Benchmarks;

/// <summary>Predicts a file of protocol versions again and again, with the product's engine, and prints the median time as JSON in the last line.</summary>
internal static class SweepCommand
{
    private const int WarmUps = 30;

    internal static int Run(string[] arguments)
    {
        if (Options.Parse(arguments) is not { } options)
        {
            Console.Error.WriteLine("sweep FILE --algorithm textbook|pruned --threads N --repeat R --output OUT");
            return 2;
        }

        var workload = SweepWorkload.Read(options.File);
        var signals = new double[workload.LaneCount];
        for (var i = 0; i < WarmUps; i++)
            workload.Run(options.Pruned, options.Threads, signals);

        var times = new double[options.Repeat];
        for (var i = 0; i < times.Length; i++)
        {
            var start = Stopwatch.GetTimestamp();
            workload.Run(options.Pruned, options.Threads, signals);
            times[i] = Stopwatch.GetElapsedTime(start).TotalMilliseconds;
        }

        Array.Sort(times);
        var bytes = MemoryMarshal.AsBytes(signals.AsSpan()).ToArray();
        if (options.Output is { } output)
            File.WriteAllBytes(output, bytes);
        using var process = Process.GetCurrentProcess();
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"fastest {times[0]:F3} ms, slowest {times[^1]:F3} ms over {times.Length} runs"));
        Console.WriteLine(JsonSerializer.Serialize(new
        {
            medianMs = times[times.Length / 2],
            lanes = workload.LaneCount,
            checksum = Convert.ToHexStringLower(SHA256.HashData(bytes)),
            peakMemoryBytes = process.PeakWorkingSet64,
        }));
        return 0;
    }

    private sealed record Options(string File, bool Pruned, int Threads, int Repeat, string? Output)
    {
        internal static Options? Parse(string[] arguments)
        {
            if (arguments.Length == 0 || arguments.Length % 2 == 0)
                return null;
            var options = new Options(arguments[0], true, 1, 21, null);
            for (var i = 1; i < arguments.Length; i += 2)
            {
                var value = arguments[i + 1];
                var next = (arguments[i], value) switch
                {
                    ("--algorithm", "textbook") => options with { Pruned = false },
                    ("--algorithm", "pruned") => options with { Pruned = true },
                    ("--threads", _) when int.TryParse(value, CultureInfo.InvariantCulture, out var n) && n > 0 => options with { Threads = n },
                    ("--repeat", _) when int.TryParse(value, CultureInfo.InvariantCulture, out var n) && n > 0 => options with { Repeat = n },
                    ("--output", _) => options with { Output = value },
                    _ => null,
                };
                if (next is null)
                    return null;
                options = next;
            }

            return options;
        }
    }
}
