using System.CommandLine;
using ProtoLedger.Cli;

return await new RootCommand("Tools of an installation of ProtoLedger.")
{
    QualifyCommand.Create(),
    VerifyCommand.Create(),
}.Parse(args).InvokeAsync();
