SELECT coalesce(max(sequence) + 1, 0)
FROM ledger_leaf
