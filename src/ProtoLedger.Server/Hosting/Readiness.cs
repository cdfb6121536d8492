namespace ProtoLedger.Server.Hosting;

/// <summary>Whether the start has finished: migrated, imported, first run complete.</summary>
internal sealed class Readiness
{
    private volatile bool started;

    public bool IsStarted => started;

    public void MarkStarted() => started = true;
}
