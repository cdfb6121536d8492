SELECT certificate_sha256, account, certificate, wrapped_key, enrolled_by, created_at
FROM person_key
WHERE account = @account AND NOT EXISTS (SELECT FROM revocation WHERE revocation.certificate_sha256 = person_key.certificate_sha256)
ORDER BY created_at DESC
LIMIT 1
