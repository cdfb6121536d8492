UPDATE run_job
SET lease_until = NULL, failure = @failure, run_after = now() + make_interval(secs => @delaySeconds)
WHERE id = @id AND epoch = @epoch AND state = 'queued'
