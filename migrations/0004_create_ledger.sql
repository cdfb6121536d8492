-- Every fact of record is a leaf of one append-only tree, so that a removed or altered fact shows.
CREATE TABLE ledger_leaf (
    sequence bigint NOT NULL,
    bytes bytea NOT NULL,
    hash bytea NOT NULL,
    CONSTRAINT pk_ledger_leaf PRIMARY KEY (sequence),
    CONSTRAINT ck_ledger_leaf_sequence CHECK (sequence >= 0),
    CONSTRAINT ck_ledger_leaf_hash CHECK (hash = sha256('\x00'::bytea || bytes))
);
COMMENT ON TABLE ledger_leaf IS 'Leaves of the RFC 9162 tree.';
COMMENT ON COLUMN ledger_leaf.sequence IS 'from 0, dense';
COMMENT ON COLUMN ledger_leaf.bytes IS 'canonical JSON {type, v, time, actor, subject, blobs}';
COMMENT ON COLUMN ledger_leaf.hash IS 'SHA-256 of 0x00 and bytes, 32 bytes';

CREATE TABLE ledger_node (
    level smallint NOT NULL,
    index bigint NOT NULL,
    hash bytea NOT NULL,
    CONSTRAINT pk_ledger_node PRIMARY KEY (level, index),
    CONSTRAINT ck_ledger_node_place CHECK (level BETWEEN 0 AND 62 AND index >= 0),
    CONSTRAINT ck_ledger_node_hash CHECK (length(hash) = 32)
);
COMMENT ON TABLE ledger_node IS 'Hashes of complete subtrees, so that an append and a proof cost O(log n).';
COMMENT ON COLUMN ledger_node.level IS '0 for a leaf; a node covers 2^level leaves';
COMMENT ON COLUMN ledger_node.index IS 'from 0, from the left at its level';

CREATE TABLE ledger_checkpoint (
    size bigint NOT NULL,
    root bytea NOT NULL,
    note text NOT NULL,
    created_at timestamptz NOT NULL,
    CONSTRAINT pk_ledger_checkpoint PRIMARY KEY (size),
    CONSTRAINT ck_ledger_checkpoint_root CHECK (length(root) = 32)
);
COMMENT ON TABLE ledger_checkpoint IS 'Signed notes over size and root.';
COMMENT ON COLUMN ledger_checkpoint.size IS 'leaves covered';
COMMENT ON COLUMN ledger_checkpoint.created_at IS 'UTC';

GRANT SELECT, INSERT ON ledger_leaf, ledger_node, ledger_checkpoint TO protoledger_application;
