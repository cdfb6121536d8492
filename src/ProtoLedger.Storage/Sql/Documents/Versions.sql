SELECT kind, id, version, bytes, sha256, base_version, created_at, created_by, author, reason, change_request_id, imported, stated_time, source, source_sha256
FROM document
WHERE kind = @kind AND id = @id
ORDER BY version
