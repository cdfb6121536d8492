UPDATE token
SET ended_at = @at
WHERE account = @account AND ended_at IS NULL AND (@sha256::bytea IS NULL OR sha256 = @sha256)
