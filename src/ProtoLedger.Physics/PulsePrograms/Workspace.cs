namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Memory of one thread for the engine: grows to the largest program met, so that runs allocate nothing.</summary>
internal static class Workspace
{
    private const int Alignment = 64;

    [ThreadStatic]
    private static byte[]? _memory;

    /// <summary>At least so many bytes, aligned to a cache line; pinned, contents undefined; valid until the thread's next call.</summary>
    internal static unsafe byte* Rent(int bytes)
    {
        if (_memory is null || _memory.Length < bytes + Alignment)
            _memory = GC.AllocateUninitializedArray<byte>(Math.Max(1 << 18, bytes + Alignment), pinned: true);
        var address = (nuint)System.Runtime.CompilerServices.Unsafe.AsPointer(ref _memory[0]);
        return (byte*)((address + Alignment - 1) & ~(nuint)(Alignment - 1));
    }
}
