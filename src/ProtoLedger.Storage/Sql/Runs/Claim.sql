UPDATE run_job
SET lease_until = now() + make_interval(secs => @leaseSeconds), worker = @worker, epoch = epoch + 1, attempts = attempts + 1
WHERE id = (
    SELECT id
    FROM run_job
    WHERE state = 'queued' AND run_after <= now() AND (lease_until IS NULL OR lease_until < now())
    ORDER BY priority, run, id
    FOR UPDATE SKIP LOCKED
    LIMIT 1)
RETURNING id, run, stage, payload, epoch, attempts
