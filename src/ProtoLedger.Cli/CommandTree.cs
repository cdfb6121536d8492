using System.CommandLine;

namespace ProtoLedger.Cli;

/// <summary>All commands of the tool.</summary>
internal static class CommandTree
{
    public static RootCommand Create() => new("Tools of an installation of ProtoLedger.")
    {
        QualifyCommand.Create(),
        VerifyCommand.Create(),
        AuditCommand.Create(),
        ExportCommand.Create(),
        ImportCommand.Create(),
        AddAdministratorCommand.Create(),
        KillTestCommand.Create(),
    };
}
