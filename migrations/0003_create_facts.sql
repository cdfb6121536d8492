-- Which version was effective or loaded where and when is a fact of its own, never a state of a version.
CREATE TABLE effective_fact (
    number bigint GENERATED ALWAYS AS IDENTITY,
    kind text NOT NULL,
    document_id text NOT NULL,
    version integer NOT NULL,
    scanner text NOT NULL,
    valid_from timestamptz NOT NULL,
    recorded_at timestamptz NOT NULL,
    recorded_by text NOT NULL,
    change_request_id bigint,
    imported boolean NOT NULL,
    CONSTRAINT pk_effective_fact PRIMARY KEY (number),
    CONSTRAINT fk_effective_fact_document FOREIGN KEY (kind, document_id, version) REFERENCES document (kind, id, version),
    CONSTRAINT fk_effective_fact_change_request FOREIGN KEY (change_request_id) REFERENCES change_request (id),
    CONSTRAINT ck_effective_fact_scanner CHECK ((kind = 'protocol') = (scanner <> '*'))
);
CREATE INDEX ix_effective_fact_document ON effective_fact (kind, document_id, scanner, valid_from, number);
COMMENT ON TABLE effective_fact IS 'A version is effective from a time on; the next fact of the same document and scanner ends it.';
COMMENT ON COLUMN effective_fact.scanner IS 'scanner identifier; * for documents of other kinds than protocol';
COMMENT ON COLUMN effective_fact.valid_from IS 'UTC, inclusive';
COMMENT ON COLUMN effective_fact.recorded_at IS 'UTC, of the server''s clock';

CREATE TABLE loaded_fact (
    number bigint GENERATED ALWAYS AS IDENTITY,
    protocol text NOT NULL,
    version integer NOT NULL,
    scanner text NOT NULL,
    step text NOT NULL,
    account text NOT NULL,
    recorded_at timestamptz NOT NULL,
    kind text NOT NULL GENERATED ALWAYS AS ('protocol') STORED,
    CONSTRAINT pk_loaded_fact PRIMARY KEY (number),
    CONSTRAINT fk_loaded_fact_document FOREIGN KEY (kind, protocol, version) REFERENCES document (kind, id, version),
    CONSTRAINT ck_loaded_fact_step CHECK (step IN ('entered', 'checked'))
);
CREATE INDEX ix_loaded_fact_protocol ON loaded_fact (protocol, scanner, number);
COMMENT ON TABLE loaded_fact IS 'A version was entered at a console, and checked there by a second person.';
COMMENT ON COLUMN loaded_fact.recorded_at IS 'UTC, of the server''s clock';

GRANT SELECT, INSERT ON effective_fact, loaded_fact TO protoledger_application;
