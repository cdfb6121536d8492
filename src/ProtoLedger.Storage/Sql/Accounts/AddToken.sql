INSERT INTO token (sha256, account, kind, label, scopes, created_at, last_used_at, expires_at, ended_at)
VALUES (@sha256, @account, @kind, @label, @scopes, @createdAt, @lastUsedAt, @expiresAt, @endedAt)
