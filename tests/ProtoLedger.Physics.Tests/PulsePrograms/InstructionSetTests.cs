using System.Diagnostics;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using System.Security.Cryptography;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Physics.Tests.PulsePrograms;

/// <summary>Bits of every family under each instruction-set switch, in processes of their own.</summary>
public sealed class InstructionSetTests
{
    private const string FileVariable = "PROTOLEDGER_BITS_FILE";

    /// <summary>Written to the file that the variable names; the parent test compares it.</summary>
    [Fact]
    public void Bits_OfAllProbes_AreHashed()
    {
        var bits = MemoryMarshal.AsBytes(Probes.Results().ToArray().AsSpan());
        var hash = Convert.ToHexStringLower(SHA256.HashData(bits));
        Assert.DoesNotContain(double.NaN, Probes.Results());
        if (Environment.GetEnvironmentVariable(FileVariable) is { Length: > 0 } path)
            File.WriteAllText(path, $"{hash} {Vector512.IsHardwareAccelerated} {Vector256.IsHardwareAccelerated}");
    }

    [Theory]
    [InlineData("DOTNET_EnableAVX512")]
    [InlineData("DOTNET_EnableAVX2")]
    [InlineData("DOTNET_EnableAVX")]
    [InlineData("DOTNET_EnableHWIntrinsic")]
    public void Bits_WithAnInstructionSetSwitchedOff_AreTheSame(string variable)
    {
        var plain = RunChild(null);
        var switched = RunChild(variable);

        Assert.Equal(plain.Hash, switched.Hash);
        var stillOn = variable switch
        {
            "DOTNET_EnableAVX512" => switched.Widest,
            "DOTNET_EnableAVX2" => switched.Widest || switched.Wide,
            _ => switched.Wide,
        };
        Assert.False(stillOn, "The switch had no effect.");
    }

    private static (string Hash, bool Widest, bool Wide) RunChild(string? variable)
    {
        var path = Path.GetTempFileName();
        var program = Path.ChangeExtension(typeof(InstructionSetTests).Assembly.Location, OperatingSystem.IsWindows() ? ".exe" : null);
        var start = new ProcessStartInfo(program!) { RedirectStandardOutput = true, RedirectStandardError = true };
        start.ArgumentList.Add("-method");
        start.ArgumentList.Add($"*{nameof(InstructionSetTests)}.{nameof(Bits_OfAllProbes_AreHashed)}");
        start.Environment[FileVariable] = path;
        if (variable is not null)
            start.Environment[variable] = "0";
        using var child = Process.Start(start)!;
        var output = child.StandardOutput.ReadToEnd();
        child.WaitForExit();
        var words = File.ReadAllText(path).Split(' ');
        File.Delete(path);
        Assert.True(words.Length == 3, output);
        return (words[0], bool.Parse(words[1]), bool.Parse(words[2]));
    }
}
