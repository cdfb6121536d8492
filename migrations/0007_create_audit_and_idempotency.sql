-- Reads, signatures and denials leave a trace; a repeated request gets the answer of the first.
CREATE TABLE audit_event (
    number bigint GENERATED ALWAYS AS IDENTITY,
    time timestamptz NOT NULL,
    actor text NOT NULL,
    action text NOT NULL,
    subject text NOT NULL,
    outcome text NOT NULL,
    detail text NOT NULL,
    address text,
    CONSTRAINT pk_audit_event PRIMARY KEY (number),
    CONSTRAINT ck_audit_event_outcome CHECK (outcome IN ('done', 'denied', 'failed', 'read'))
);
CREATE INDEX ix_audit_event_actor ON audit_event (actor, number);
CREATE INDEX ix_audit_event_time ON audit_event (time);
COMMENT ON TABLE audit_event IS 'Who did, read, signed or was denied what.';
COMMENT ON COLUMN audit_event.time IS 'UTC, of the server''s clock';
COMMENT ON COLUMN audit_event.address IS 'where the request came from';

CREATE TABLE idempotency (
    account text NOT NULL,
    key text NOT NULL,
    request_sha256 bytea NOT NULL,
    response bytea NOT NULL,
    created_at timestamptz NOT NULL,
    CONSTRAINT pk_idempotency PRIMARY KEY (account, key),
    CONSTRAINT ck_idempotency_key CHECK (length(key) BETWEEN 1 AND 200)
);
COMMENT ON TABLE idempotency IS 'Answers by the client''s key, written in the transaction of their effect.';
COMMENT ON COLUMN idempotency.request_sha256 IS 'SHA-256 of the request that was answered';
COMMENT ON COLUMN idempotency.response IS 'JSON of the result';
COMMENT ON COLUMN idempotency.created_at IS 'UTC';

GRANT SELECT, INSERT ON audit_event, idempotency TO protoledger_application;
