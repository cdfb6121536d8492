SELECT id, kind, document_id, base_version, bytes, sha256, reason, author, author_name, state, row_version, round, created_at, submitted_at, decided_at, decided_by, decision_reason, version, imported, source, run_id
FROM change_request
WHERE (@state::text IS NULL OR state = @state)
  AND (@kind::text IS NULL OR (kind = @kind AND document_id = @documentId))
  AND (@author::text IS NULL OR author = @author)
  AND (@before::bigint IS NULL OR id < @before)
ORDER BY id DESC
LIMIT @limit
