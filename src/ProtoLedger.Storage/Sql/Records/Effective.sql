SELECT kind, document_id, version, scanner, valid_from, recorded_at, recorded_by, change_request_id, imported
FROM effective_fact
ORDER BY number
