using ProtoLedger.Server.Hosting;

return await ServerProgram.RunAsync(args);
