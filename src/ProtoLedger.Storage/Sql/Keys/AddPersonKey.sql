INSERT INTO person_key (certificate_sha256, account, certificate, wrapped_key, enrolled_by, created_at)
VALUES (@certificateSha256, @account, @certificate, @wrappedKey, @enrolledBy, @createdAt)
