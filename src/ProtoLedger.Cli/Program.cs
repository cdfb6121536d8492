using ProtoLedger.Cli;

return await CommandTree.Create().Parse(args).InvokeAsync();
