SELECT run, protocol, version, change_request_id, scanner, document_sha256, input_sha256, observables_sha256, nominal, low, high, probability, verdict, nominal_verdict, packed_sha256
FROM run_result
WHERE run = @run AND (@protocol::text IS NULL OR protocol = @protocol)
ORDER BY protocol, version, change_request_id, scanner
