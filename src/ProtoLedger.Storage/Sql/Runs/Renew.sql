UPDATE run_job
SET lease_until = now() + make_interval(secs => @leaseSeconds)
WHERE id = @id AND epoch = @epoch AND state = 'queued'
