SELECT pg_try_advisory_xact_lock(hashtextextended(@account || ' ' || @key, 1))
