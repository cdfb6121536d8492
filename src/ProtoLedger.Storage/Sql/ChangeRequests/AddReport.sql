INSERT INTO report (change_request_id, document_sha256, round, run_id, model_id, json_sha256, markdown_sha256, html_sha256, inputs_sha256, created_at)
VALUES (@changeRequestId, @documentSha256, @round, @runId, @modelId, @jsonSha256, @markdownSha256, @htmlSha256, @inputsSha256, @createdAt)
