INSERT INTO signature (change_request_id, number, round, signer, signer_name, role, meaning, signed_at, certificate_sha256, manifest, cms)
VALUES (@changeRequestId, @number, @round, @signer, @signerName, @role, @meaning, @time, @certificateSha256, @manifest, @cms)
