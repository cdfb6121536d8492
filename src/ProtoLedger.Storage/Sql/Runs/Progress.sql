SELECT count(*)::integer AS total,
       (count(*) FILTER (WHERE state <> 'queued'))::integer AS done,
       (count(*) FILTER (WHERE state = 'failed'))::integer AS failed,
       coalesce(sum(shared), 0)::integer AS shared
FROM run_job
WHERE run = @run AND stage = 'shard'
