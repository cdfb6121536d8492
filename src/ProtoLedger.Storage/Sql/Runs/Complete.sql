UPDATE run
SET state = @state, finished_at = @finishedAt, versions = @versions, proposals = @proposals, results = @results, shared = @shared,
    moved = @moved, newly_failing = @newlyFailing, newly_holding = @newlyHolding, failed_shards = @failedShards,
    findings_sha256 = @findingsSha256
WHERE id = @id
