SELECT id, cause, change_request_id, state, model_id, inputs_sha256, queued_at, started_at, finished_at, versions, proposals, results, shared, moved, newly_failing, newly_holding, failed_shards, findings_sha256
FROM run
WHERE id < @before AND state = 'completed'
  AND NOT EXISTS (SELECT FROM change_request WHERE change_request.id = run.change_request_id AND change_request.kind <> 'protocol')
ORDER BY id DESC
LIMIT 1
