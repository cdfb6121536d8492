SELECT sha256, account, kind, label, scopes, created_at, last_used_at, expires_at, ended_at
FROM token
WHERE sha256 = @sha256
