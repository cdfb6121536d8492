INSERT INTO account (name, display_name, password_hash, roles, failed_attempts, locked_until, disabled, demo, totp_secret, totp_step, created_at)
VALUES (@name, @displayName, @passwordHash, @roles, @failedAttempts, @lockedUntil, @disabled, @demo, @totpSecret, @totpStep, @createdAt)
ON CONFLICT (name) DO NOTHING
