#!/usr/bin/env python3
"""Compares the engine with general-purpose baselines on one workload, in interleaved rounds of one run.

  python3 docs/measurements/sweep.py BASELINES ROUNDS > docs/measurements/sweep.log

BASELINES is a folder outside this repository with the workload (versions.bin), the C program epg_bench and numpy_epg.py, built there with `make`.
The benchmarks are built first: dotnet build tests/ProtoLedger.Benchmarks -c Release. Ratios are of medians over the rounds. On a machine that
does other work as well (see the load) medians measure that work; the fastest run of each side is then the better estimate.
"""
import array, json, os, re, statistics, subprocess, sys

folder, rounds = sys.argv[1], int(sys.argv[2])
root = os.path.dirname(os.path.dirname(os.path.dirname(os.path.abspath(__file__))))
program = os.path.join(root, "tests/artifacts/bin/ProtoLedger.Benchmarks/release/ProtoLedger.Benchmarks.dll")
times = {}


def note(name, milliseconds):
    times.setdefault(name, []).append(milliseconds)
    return f"{name} {milliseconds:.3f}"


def c_baseline():
    text = subprocess.run(["./epg_bench", "41"], cwd=folder, capture_output=True, text=True, check=True).stdout
    for algorithm, threads, median, fastest in re.findall(r"c (\w+) f64 (\d) thread: median ([\d.]+) ms \(min ([\d.]+)", text):
        note(f"C {algorithm} {threads} fastest", float(fastest))
        yield note(f"C {algorithm} {threads}", float(median))


def numpy_baseline():
    text = subprocess.run(["/usr/bin/python3", "numpy_epg.py", "quick"], cwd=folder, capture_output=True, text=True, check=True).stdout
    for algorithm, fastest in re.findall(r"numpy (\w+) chunk.*?min ([\d.]+)", text):
        note(f"NumPy {algorithm} 1 fastest", float(fastest))
    for algorithm, median in re.findall(r"numpy (\w+) BEST ([\d.]+) ms", text):
        yield note(f"NumPy {algorithm} 1", float(median))


def engine(algorithm, threads):
    output = os.path.join(folder, f"out_engine_{algorithm}.bin")
    text = subprocess.run(
        ["dotnet", program, "sweep", os.path.join(folder, "versions.bin"), "--algorithm", algorithm, "--threads", str(threads), "--repeat", "301", "--output", output],
        capture_output=True, text=True, check=True).stdout.strip().split("\n")
    note(f"engine {algorithm} {threads} fastest", float(re.search(r"fastest ([\d.]+)", text[-2]).group(1)))
    return note(f"engine {algorithm} {threads}", json.loads(text[-1])["medianMs"])


def read(name):
    values = array.array("d")
    with open(os.path.join(folder, name), "rb") as file:
        values.frombytes(file.read())
    return values


for number in range(rounds):
    parts = [engine("pruned", 1), *c_baseline(), engine("pruned", 2), *numpy_baseline(), engine("textbook", 1)]
    print(f"round {number + 1}, load {os.getloadavg()[0]:.0f}: " + ", ".join(parts), flush=True)

middle = {name: statistics.median(values) for name, values in times.items()}
print("medians, ms: " + ", ".join(f"{name} {value:.3f}" for name, value in middle.items()))
for algorithm in ("pruned", "textbook"):
    for baseline in ("out_c_pruned.bin", "out_c_textbook.bin", "out_numpy_textbook.bin"):
        difference = max(abs(a - b) for a, b in zip(read(f"out_engine_{algorithm}.bin"), read(baseline)))
        print(f"largest difference of engine {algorithm} from {baseline}: {difference:.1e}")
print(f"one thread, engine over C pruned: {middle['engine pruned 1'] / middle['C pruned 1']:.2f} (fastest of each: {min(times['engine pruned 1 fastest']) / min(times['C pruned 1 fastest']):.2f}; wanted at most 1.5)")
print(f"NumPy textbook over engine, two threads: {middle['NumPy textbook 1'] / middle['engine pruned 2']:.0f} (fastest engine run: {min(times['NumPy textbook 1 fastest']) / min(times['engine pruned 2 fastest']):.0f}; wanted at least 60)")
