using System.Security.Cryptography;

namespace ProtoLedger.Application.Site;

/// <summary>The key under which the site's own private keys are sealed: a file that only this account reads, never in the database.</summary>
public static class SealingKeyFile
{
    private const int Length = 32;

    /// <summary>Name of the file in a data folder where no other file is given.</summary>
    public const string UsualName = "sealing.key";

    /// <summary>Reads the key; makes it at the very first start.</summary>
    /// <param name="file">The file; its folder is made when it is missing.</param>
    /// <exception cref="InvalidDataException">The file does not hold a key.</exception>
    public static byte[] Read(string file)
    {
        if (!File.Exists(file))
            Make(file);
        var key = File.ReadAllBytes(file);
        return key.Length == Length ? key : throw new InvalidDataException($"{file} holds {key.Length} bytes; a sealing key has {Length}.");
    }

    /// <summary>Written aside and linked into place, so that of two first starters one wins and nobody reads half a key.</summary>
    private static void Make(string file)
    {
        Directory.CreateDirectory(Path.GetDirectoryName(Path.GetFullPath(file))!);
        var aside = $"{file}.{Environment.ProcessId}";
        var options = new FileStreamOptions { Mode = FileMode.Create, Access = FileAccess.Write };
        if (!OperatingSystem.IsWindows())
            options.UnixCreateMode = UnixFileMode.UserRead | UnixFileMode.UserWrite;
        using (var stream = new FileStream(aside, options))
        {
            stream.Write(RandomNumberGenerator.GetBytes(Length));
            stream.Flush(flushToDisk: true);
        }

        try
        {
            File.Move(aside, file, overwrite: false);
        }
        catch (IOException) when (File.Exists(file))
        {
            File.Delete(aside);
        }
    }
}
