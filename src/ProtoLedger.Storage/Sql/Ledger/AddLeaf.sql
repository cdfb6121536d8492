INSERT INTO ledger_leaf (sequence, bytes, hash)
VALUES (@sequence, @bytes, @hash)
