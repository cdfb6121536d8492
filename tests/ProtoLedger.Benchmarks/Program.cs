using BenchmarkDotNet.Running;
using ProtoLedger.Benchmarks;

if (args is ["sweep", ..])
    return SweepCommand.Run(args[1..]);
if (args.Length == 0)
{
    Console.Error.WriteLine("Name a benchmark: sweep FILE --algorithm textbook|pruned --threads N --repeat R --output OUT, or --filter '*' for the kernels.");
    return 2;
}

BenchmarkSwitcher.FromAssembly(typeof(SweepCommand).Assembly).Run(args);
return 0;
