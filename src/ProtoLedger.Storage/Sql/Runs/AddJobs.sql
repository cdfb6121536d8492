INSERT INTO run_job (run, stage, payload, priority)
SELECT @run, @stage, payload, (SELECT priority FROM run WHERE id = @run)
FROM unnest(@payloads::text[]) AS payload
