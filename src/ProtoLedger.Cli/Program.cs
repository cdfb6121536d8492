using System.CommandLine;

return await new RootCommand("Tools of an installation of ProtoLedger.").Parse(args).InvokeAsync();
