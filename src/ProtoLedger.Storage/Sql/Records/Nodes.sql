SELECT level, index, hash
FROM ledger_node
