SELECT pg_advisory_xact_lock(hashtextextended('protoledger-append', 0))
