SELECT number, time, actor, action, subject, outcome, detail, address
FROM audit_event
WHERE (@actor::text IS NULL OR actor = @actor)
  AND (@action::text IS NULL OR action = @action)
  AND (@outcome::text IS NULL OR outcome = @outcome)
  AND (@from::timestamptz IS NULL OR time >= @from)
  AND (@until::timestamptz IS NULL OR time < @until)
  AND (@before::bigint IS NULL OR number < @before)
ORDER BY number DESC
LIMIT @limit
