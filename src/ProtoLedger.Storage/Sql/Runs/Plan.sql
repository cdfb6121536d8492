UPDATE run
SET state = 'running', model_id = @modelId, inputs_sha256 = @inputsSha256, started_at = @startedAt
WHERE id = @run
