SELECT name, display_name, password_hash, roles, failed_attempts, locked_until, disabled, demo, totp_secret, totp_step, created_at
FROM account
WHERE name = @name
