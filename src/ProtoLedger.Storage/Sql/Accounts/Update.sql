UPDATE account
SET display_name = @displayName, password_hash = @passwordHash, roles = @roles, failed_attempts = @failedAttempts,
    locked_until = @lockedUntil, disabled = @disabled, totp_secret = @totpSecret, totp_step = @totpStep
WHERE name = @name
