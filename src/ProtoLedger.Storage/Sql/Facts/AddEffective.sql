INSERT INTO effective_fact (kind, document_id, version, scanner, valid_from, recorded_at, recorded_by, change_request_id, imported)
VALUES (@kind, @documentId, @version, @scanner, @validFrom, @recordedAt, @recordedBy, @changeRequestId, @imported)
