SELECT wanted.position::integer AS position, node.hash
FROM unnest(@levels::smallint[], @indexes::bigint[]) WITH ORDINALITY AS wanted (level, index, position)
JOIN ledger_node AS node USING (level, index)
ORDER BY wanted.position
