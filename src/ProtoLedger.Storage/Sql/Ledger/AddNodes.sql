INSERT INTO ledger_node (level, index, hash)
SELECT * FROM unnest(@levels::smallint[], @indexes::bigint[], @hashes::bytea[])
