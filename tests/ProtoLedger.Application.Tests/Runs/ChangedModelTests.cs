using System.Diagnostics;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Tests.Fixtures;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.Runs;

/// <summary>A program built from these very sources with one constant of the model changed, working on the same database.</summary>
public sealed class ChangedModelTests(Hospital hospital) : IClassFixture<Hospital>, IDisposable
{
    private readonly string folder = Directory.CreateTempSubdirectory("protoledger-changed-model-").FullName;

    [Fact]
    public async Task Run_ByAModelWithOneChangedConstant_MovesExactlyTheVersionsThatUseIt()
    {
        var before = await RunAsync(() => hospital.Get<RunWorker>().DrainAsync(default));
        Assert.Equal(0, before.Moved);
        var root = SourceTree.Root;
        foreach (var file in new[] { "Directory.Build.props", "Directory.Packages.props", "global.json", ".editorconfig" })
            File.Copy(Path.Combine(root, file), Path.Combine(folder, file));
        Copy(Path.Combine(root, "src"), Path.Combine(folder, "src"));
        Copy(Path.Combine(root, "migrations"), Path.Combine(folder, "migrations"));
        Change("src/ProtoLedger.Physics/Acquisition/RfPulse.cs", "new(\"adiabatic\", 0.96, 0.02)", "new(\"adiabatic\", 0.95, 0.02)");
        WriteWorker();
        await DotnetAsync("build", "worker", "-v", "quiet", "-p:RunAnalyzers=false");

        var after = await RunAsync(() => DotnetAsync(Path.Combine(folder, "out", "worker.dll"), hospital.ConnectionString));

        // Versions with an inversion whose pulse is the built-in one: no test scanner lists a pulse of that name.
        await using var count = hospital.Source.CreateCommand(
            """
            SELECT count(*) FROM document
            WHERE kind = 'protocol' AND jsonb_path_exists(
                convert_from(bytes, 'UTF8')::jsonb,
                '$.series[*].preparations[*] ? (@.kind == "inversion" && (!exists(@.pulse) || @.pulse == "adiabatic"))')
            """);
        var expected = (int)(long)(await count.ExecuteScalarAsync())!;
        Assert.InRange(expected, 1, after.Versions - 1);
        Assert.Equal(expected, after.Moved);
    }

    public void Dispose() => Directory.Delete(folder, recursive: true);

    private async Task<RunSummary> RunAsync(Func<Task> work)
    {
        var run = Done(await hospital.Get<EnqueueRun>().RunAsync(hospital.Physicist, RunCause.Manual, default));
        await work();
        var summary = Done(await hospital.Get<ReadRuns>().GetAsync(hospital.Technologist, run, default)).Summary;
        Assert.Equal(("completed", 0), (summary.State, summary.FailedShards));
        return summary;
    }

    private void WriteWorker()
    {
        Directory.CreateDirectory(Path.Combine(folder, "worker"));
        File.WriteAllText(Path.Combine(folder, "worker", "worker.csproj"), $"""
            <Project Sdk="Microsoft.NET.Sdk">
              <PropertyGroup><OutputType>Exe</OutputType><OutDir>{folder}/out/</OutDir></PropertyGroup>
              <ItemGroup><ProjectReference Include="../src/ProtoLedger.Storage/ProtoLedger.Storage.csproj" /></ItemGroup>
            </Project>
            """);
        File.WriteAllText(Path.Combine(folder, "worker", "Program.cs"), """
            using Microsoft.Extensions.DependencyInjection;
            using ProtoLedger.Application;
            using ProtoLedger.Application.Runs;
            using ProtoLedger.Application.Site;
            using ProtoLedger.Storage.Sessions;

            await using var services = new ServiceCollection()
                .AddSingleton(TimeProvider.System)
                .AddLogging()
                .AddProtoLedgerApplication(new SiteOptions("Test hospital", "test.example/log", new byte[32]))
                .AddProtoLedgerStorage(args[0])
                .BuildServiceProvider();
            await services.GetRequiredService<RunWorker>().DrainAsync(CancellationToken.None);
            """);
    }

    private void Change(string file, string old, string now)
    {
        var path = Path.Combine(folder, file);
        var text = File.ReadAllText(path);
        Assert.Contains(old, text, StringComparison.Ordinal);
        File.WriteAllText(path, text.Replace(old, now, StringComparison.Ordinal));
    }

    private static void Copy(string from, string to)
    {
        foreach (var file in Directory.EnumerateFiles(from, "*", SearchOption.AllDirectories))
        {
            var name = Path.GetRelativePath(from, file);
            if (name.Split(Path.DirectorySeparatorChar).Any(part => part is "obj" or "bin" or "artifacts"))
                continue;
            Directory.CreateDirectory(Path.GetDirectoryName(Path.Combine(to, name))!);
            File.Copy(file, Path.Combine(to, name));
        }
    }

    private async Task DotnetAsync(params string[] arguments)
    {
        using var process = Process.Start(new ProcessStartInfo("dotnet", arguments) { WorkingDirectory = folder, RedirectStandardOutput = true, RedirectStandardError = true })!;
        var output = process.StandardOutput.ReadToEndAsync();
        var errors = process.StandardError.ReadToEndAsync();
        await process.WaitForExitAsync();
        Assert.True(process.ExitCode == 0, await output + await errors);
    }
}
