SELECT request_sha256, response, created_at
FROM idempotency
WHERE account = @account AND key = @key
