SELECT change_request_id, number, round, signer, signer_name, role, meaning, signed_at AS time, certificate_sha256, manifest, cms
FROM signature
ORDER BY change_request_id, number
