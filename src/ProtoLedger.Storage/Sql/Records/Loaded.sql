SELECT protocol, version, scanner, step, account, recorded_at AS at
FROM loaded_fact
ORDER BY number
