WITH intervals AS (
    SELECT kind, document_id, version, scanner, valid_from, recorded_at, recorded_by, change_request_id, imported, number,
           lead(valid_from) OVER (PARTITION BY kind, document_id, scanner ORDER BY valid_from, number) AS valid_until
    FROM effective_fact
    WHERE kind = @kind AND document_id = @documentId
)
SELECT kind, document_id, version, scanner, valid_from, valid_until, recorded_at, recorded_by, change_request_id, imported
FROM intervals
WHERE valid_until IS DISTINCT FROM valid_from
ORDER BY kind, document_id, scanner, valid_from
