INSERT INTO revocation (certificate_sha256, revoked_at, revoked_by, reason)
VALUES (@certificateSha256, @revokedAt, @revokedBy, @reason)
ON CONFLICT (certificate_sha256) DO NOTHING
