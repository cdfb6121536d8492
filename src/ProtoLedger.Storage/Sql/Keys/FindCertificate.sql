SELECT certificate_sha256, account, certificate, wrapped_key, enrolled_by, created_at
FROM person_key
WHERE certificate_sha256 = @sha256
