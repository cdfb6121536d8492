SELECT id
FROM change_request
WHERE kind = @kind AND document_id = @documentId AND state = 'under review' AND id <> @except
ORDER BY id
LIMIT 1
