UPDATE token
SET last_used_at = @at
WHERE sha256 = @sha256
