SELECT id, kind, document_id, base_version, bytes, sha256, reason, author, author_name, state, row_version, round, created_at, submitted_at, decided_at, decided_by, decision_reason, version, imported, source, run_id
FROM change_request
ORDER BY id
