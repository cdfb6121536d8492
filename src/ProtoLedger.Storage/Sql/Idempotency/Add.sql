INSERT INTO idempotency (account, key, request_sha256, response, created_at)
VALUES (@account, @key, @requestSha256, @response, @createdAt)
