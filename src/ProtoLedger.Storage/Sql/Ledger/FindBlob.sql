SELECT bytes
FROM blob
WHERE sha256 = @sha256
