INSERT INTO site_key (ca_certificate, ca_key_sealed, note_key_sealed, note_verifier, origin, created_at)
VALUES (@caCertificate, @caKeySealed, @noteKeySealed, @noteVerifier, @origin, @createdAt)
ON CONFLICT (singleton) DO NOTHING
