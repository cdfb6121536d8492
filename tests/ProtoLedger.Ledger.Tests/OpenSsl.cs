using System.Diagnostics;

namespace ProtoLedger.Ledger.Tests;

/// <summary>Runs the openssl program, the second opinion on certificates and signatures.</summary>
internal static class OpenSsl
{
    private static readonly bool Present = Probe();

    /// <summary>Skips the running test where there is no openssl program.</summary>
    public static void Require() => Assert.SkipUnless(Present, "the openssl program is not on the PATH of this machine");

    /// <summary>The command that reports and bundles print for readers.</summary>
    public static (int ExitCode, string Output) VerifyCms(string folder, DateTimeOffset at, params string[] more) =>
        Run(folder, [
            "cms", "-verify", "-binary", "-inform", "DER", "-in", "approval.p7s", "-content", "manifest.json",
            "-CAfile", "site-ca.pem", "-purpose", "any", "-attime", at.ToUnixTimeSeconds().ToString(System.Globalization.CultureInfo.InvariantCulture),
            "-out", "/dev/null", .. more,
        ]);

    public static (int ExitCode, string Output) Run(string folder, params string[] arguments)
    {
        var start = new ProcessStartInfo("openssl", arguments)
        {
            WorkingDirectory = folder, RedirectStandardError = true, RedirectStandardOutput = true,
        };
        using var process = Process.Start(start)!;
        var error = process.StandardError.ReadToEndAsync();
        var output = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        return (process.ExitCode, output + error.Result);
    }

    private static bool Probe()
    {
        try
        {
            return Run(Path.GetTempPath(), "version").ExitCode == 0;
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return false;
        }
    }
}
