INSERT INTO blob (sha256, bytes)
VALUES (sha256(@bytes), @bytes)
ON CONFLICT (sha256) DO NOTHING
