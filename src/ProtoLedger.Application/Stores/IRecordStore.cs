namespace ProtoLedger.Application.Stores;

/// <summary>Everything that is of record, read as raw as it is stored: for the audit and for bundles.</summary>
public interface IRecordStore
{
    /// <summary>Effective facts in the order in which they were recorded.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<EffectiveRow>> EffectiveAsync(CancellationToken cancellationToken);

    /// <summary>Loading facts in the order in which they were recorded.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<LoadedRow>> LoadedAsync(CancellationToken cancellationToken);

    /// <summary>Signatures, by request and number.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<SignatureRow>> SignaturesAsync(CancellationToken cancellationToken);

    /// <summary>Certificates of people, oldest first.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<PersonKeyRow>> CertificatesAsync(CancellationToken cancellationToken);

    /// <summary>Change requests, by number.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<ChangeRequestRow>> ChangeRequestsAsync(CancellationToken cancellationToken);

    /// <summary>Every stored node of the tree.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<NodeRow>> NodesAsync(CancellationToken cancellationToken);

    /// <summary>Every stored checkpoint, smallest first.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<CheckpointRow>> CheckpointsAsync(CancellationToken cancellationToken);
}
