SELECT ca_certificate, ca_key_sealed, note_key_sealed, note_verifier, origin, created_at
FROM site_key
