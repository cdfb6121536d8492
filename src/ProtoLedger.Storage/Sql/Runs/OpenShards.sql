SELECT count(*)
FROM run_job
WHERE run = @run AND stage = 'shard' AND state = 'queued'
