INSERT INTO document (kind, id, version, bytes, sha256, base_version, created_at, created_by, author, reason, change_request_id, imported, stated_time, source, source_sha256)
VALUES (@kind, @id, @version, @bytes, @sha256, @baseVersion, @createdAt, @createdBy, @author, @reason, @changeRequestId, @imported, @statedTime, @source, @sourceSha256)
