SELECT size, root, note, created_at
FROM ledger_checkpoint
ORDER BY size
