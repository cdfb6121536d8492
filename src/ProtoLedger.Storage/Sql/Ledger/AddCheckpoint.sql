INSERT INTO ledger_checkpoint (size, root, note, created_at)
VALUES (@size, @root, @note, @createdAt)
