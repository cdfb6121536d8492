UPDATE change_request
SET base_version = @baseVersion, bytes = @bytes, sha256 = @sha256, reason = @reason, state = @state, row_version = row_version + 1,
    round = @round, submitted_at = @submittedAt, decided_at = @decidedAt, decided_by = @decidedBy, decision_reason = @decisionReason,
    version = @version, run_id = @runId
WHERE id = @id AND row_version = @rowVersion
