SELECT certificate_sha256, account, certificate, wrapped_key, enrolled_by, created_at
FROM person_key
ORDER BY created_at, certificate_sha256
