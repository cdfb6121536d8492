INSERT INTO run (cause, change_request_id, state, priority, queued_at)
VALUES (@cause, @changeRequestId, 'queued', @priority, @queuedAt)
RETURNING id
