SELECT DISTINCT ON (id) kind, id, version, bytes, sha256, base_version, created_at, created_by, author, reason, change_request_id, imported, stated_time, source, source_sha256
FROM document
WHERE kind = @kind AND (@after::text IS NULL OR id > @after)
ORDER BY id, version DESC
LIMIT @limit
