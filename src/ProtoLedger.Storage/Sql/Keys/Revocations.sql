SELECT certificate_sha256, revoked_at, revoked_by, reason
FROM revocation
ORDER BY revoked_at, certificate_sha256
