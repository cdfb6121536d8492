UPDATE run_job
SET state = @state, failure = @failure, shared = @shared, lease_until = NULL
WHERE id = @id AND epoch = @epoch AND state = 'queued'
