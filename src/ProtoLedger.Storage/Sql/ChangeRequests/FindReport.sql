SELECT change_request_id, document_sha256, round, run_id, model_id, json_sha256, markdown_sha256, html_sha256, inputs_sha256, created_at
FROM report
WHERE change_request_id = @id AND document_sha256 = @documentSha256 AND round = @round
ORDER BY run_id DESC
LIMIT 1
