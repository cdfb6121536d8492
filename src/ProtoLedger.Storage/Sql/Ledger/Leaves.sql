SELECT sequence, bytes, hash
FROM ledger_leaf
WHERE sequence >= @from
ORDER BY sequence
LIMIT @limit
