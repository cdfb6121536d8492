-- Every document on which predictions depend is kept for ever as the exact bytes that were hashed.
CREATE TABLE blob (
    sha256 bytea NOT NULL,
    bytes bytea NOT NULL,
    CONSTRAINT pk_blob PRIMARY KEY (sha256),
    CONSTRAINT ck_blob_sha256 CHECK (sha256 = sha256(bytes))
);
COMMENT ON TABLE blob IS 'Contents named by their hash: documents, reports, findings, manifests.';
COMMENT ON COLUMN blob.sha256 IS 'SHA-256 of bytes, 32 bytes';
COMMENT ON COLUMN blob.bytes IS 'contents as they were hashed';

CREATE TABLE change_request (
    id bigint GENERATED ALWAYS AS IDENTITY,
    kind text NOT NULL,
    document_id text NOT NULL,
    base_version integer NOT NULL,
    bytes bytea NOT NULL,
    sha256 bytea NOT NULL,
    reason text NOT NULL,
    author text NOT NULL,
    author_name text NOT NULL,
    state text NOT NULL,
    row_version bigint NOT NULL,
    round integer NOT NULL,
    created_at timestamptz NOT NULL,
    submitted_at timestamptz,
    decided_at timestamptz,
    decided_by text,
    decision_reason text,
    version integer,
    imported boolean NOT NULL,
    source text,
    run_id bigint,
    CONSTRAINT pk_change_request PRIMARY KEY (id),
    CONSTRAINT ck_change_request_kind CHECK (kind IN ('protocol', 'scanner', 'conditions', 'catalogue', 'expectations')),
    CONSTRAINT ck_change_request_state CHECK (state IN ('draft', 'under review', 'approved', 'declined', 'withdrawn')),
    CONSTRAINT ck_change_request_sha256 CHECK (sha256 = sha256(bytes)),
    CONSTRAINT ck_change_request_base_version CHECK (base_version >= 0),
    CONSTRAINT ck_change_request_reason CHECK (length(btrim(reason)) > 0),
    CONSTRAINT ck_change_request_version CHECK ((state = 'approved') = (version IS NOT NULL))
);
CREATE INDEX ix_change_request_document ON change_request (kind, document_id, id);
CREATE INDEX ix_change_request_state ON change_request (state, id);
CREATE INDEX ix_change_request_author ON change_request (author, id);
COMMENT ON TABLE change_request IS 'Proposals: the only table on the way to a new version that changes in place.';
COMMENT ON COLUMN change_request.id IS 'number, from 1';
COMMENT ON COLUMN change_request.base_version IS 'version it stands on, 0 for a new document';
COMMENT ON COLUMN change_request.bytes IS 'canonical JSON of the proposed document';
COMMENT ON COLUMN change_request.row_version IS 'counts every change, from 1; the entity tag';
COMMENT ON COLUMN change_request.round IS 'counts changes of content or base under review, from 1; a signature counts in its round only';
COMMENT ON COLUMN change_request.created_at IS 'UTC; the stated date for imported history';
COMMENT ON COLUMN change_request.version IS 'version that approval created';
COMMENT ON COLUMN change_request.imported IS 'true for history that predates the tool';
COMMENT ON COLUMN change_request.run_id IS 'regression run for the present content';

CREATE TABLE document (
    kind text NOT NULL,
    id text NOT NULL,
    version integer NOT NULL,
    bytes bytea NOT NULL,
    sha256 bytea NOT NULL,
    base_version integer NOT NULL,
    created_at timestamptz NOT NULL,
    created_by text NOT NULL,
    author text NOT NULL,
    reason text NOT NULL,
    change_request_id bigint,
    imported boolean NOT NULL,
    stated_time timestamptz,
    source text,
    source_sha256 bytea,
    CONSTRAINT pk_document PRIMARY KEY (kind, id, version),
    CONSTRAINT fk_document_change_request FOREIGN KEY (change_request_id) REFERENCES change_request (id),
    CONSTRAINT uq_document_change_request UNIQUE (change_request_id),
    CONSTRAINT ck_document_kind CHECK (kind IN ('protocol', 'scanner', 'conditions', 'catalogue', 'expectations')),
    CONSTRAINT ck_document_version CHECK (version >= 1 AND base_version >= 0 AND base_version < version),
    CONSTRAINT ck_document_sha256 CHECK (sha256 = sha256(bytes)),
    CONSTRAINT ck_document_imported CHECK (imported = (change_request_id IS NULL) AND imported = (stated_time IS NOT NULL))
);
CREATE INDEX ix_document_sha256 ON document (sha256);
COMMENT ON TABLE document IS 'Immutable versions of all five kinds.';
COMMENT ON COLUMN document.version IS 'number, from 1, dense within kind and id';
COMMENT ON COLUMN document.bytes IS 'canonical JSON (RFC 8785), exactly as hashed';
COMMENT ON COLUMN document.sha256 IS 'SHA-256 of bytes, 32 bytes';
COMMENT ON COLUMN document.base_version IS 'version it was made from, 0 for the first';
COMMENT ON COLUMN document.created_at IS 'UTC, of the server''s clock';
COMMENT ON COLUMN document.stated_time IS 'UTC, as imported history states it; null for versions approved here';
COMMENT ON COLUMN document.source_sha256 IS 'SHA-256 of the imported file';

CREATE TABLE comment (
    change_request_id bigint NOT NULL,
    number integer NOT NULL,
    author text NOT NULL,
    author_name text NOT NULL,
    pointer text,
    text text NOT NULL,
    created_at timestamptz NOT NULL,
    CONSTRAINT pk_comment PRIMARY KEY (change_request_id, number),
    CONSTRAINT fk_comment_change_request FOREIGN KEY (change_request_id) REFERENCES change_request (id),
    CONSTRAINT ck_comment_text CHECK (length(text) BETWEEN 1 AND 4000)
);
COMMENT ON TABLE comment IS 'Remarks on a request or on one of its parameters.';
COMMENT ON COLUMN comment.number IS 'from 1 within the request';
COMMENT ON COLUMN comment.pointer IS 'JSON pointer of the parameter, null for the whole request';
COMMENT ON COLUMN comment.created_at IS 'UTC';

GRANT SELECT, INSERT ON blob, document, comment TO protoledger_application;
GRANT SELECT, INSERT, UPDATE ON change_request TO protoledger_application;
