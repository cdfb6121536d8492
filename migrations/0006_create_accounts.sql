-- Who acts must be known: accounts, what they sign in with, and the keys with which they sign.
CREATE TABLE account (
    name text NOT NULL,
    display_name text NOT NULL,
    password_hash text,
    roles text[] NOT NULL,
    failed_attempts integer NOT NULL DEFAULT 0,
    locked_until timestamptz,
    disabled boolean NOT NULL DEFAULT false,
    demo boolean NOT NULL DEFAULT false,
    totp_secret bytea,
    totp_step bigint NOT NULL DEFAULT 0,
    created_at timestamptz NOT NULL,
    CONSTRAINT pk_account PRIMARY KEY (name),
    CONSTRAINT ck_account_name CHECK (name ~ '^[a-z][a-z0-9.-]{0,63}$'),
    CONSTRAINT ck_account_roles CHECK (
        roles <@ ARRAY['technologist', 'lead-technologist', 'physicist', 'radiologist', 'reviewer', 'administrator'])
);
COMMENT ON TABLE account IS 'People. A name is never used again.';
COMMENT ON COLUMN account.password_hash IS 'of the platform''s password hasher; null where there is no password';
COMMENT ON COLUMN account.locked_until IS 'UTC';
COMMENT ON COLUMN account.totp_secret IS 'sealed shared secret of the second factor';
COMMENT ON COLUMN account.totp_step IS 'newest accepted time step, 30 s each since 1970';
COMMENT ON COLUMN account.created_at IS 'UTC';

CREATE TABLE token (
    sha256 bytea NOT NULL,
    account text NOT NULL,
    kind text NOT NULL,
    label text NOT NULL,
    scopes text[] NOT NULL,
    created_at timestamptz NOT NULL,
    last_used_at timestamptz NOT NULL,
    expires_at timestamptz NOT NULL,
    ended_at timestamptz,
    CONSTRAINT pk_token PRIMARY KEY (sha256),
    CONSTRAINT fk_token_account FOREIGN KEY (account) REFERENCES account (name),
    CONSTRAINT ck_token_kind CHECK (kind IN ('session', 'api'))
);
CREATE INDEX ix_token_account ON token (account);
COMMENT ON TABLE token IS 'Sessions and API tokens, known by the hash of their secret only.';
COMMENT ON COLUMN token.sha256 IS 'SHA-256 of the secret, 32 bytes';
COMMENT ON COLUMN token.last_used_at IS 'UTC; a session ends when idle too long';
COMMENT ON COLUMN token.expires_at IS 'UTC; absolute end';
COMMENT ON COLUMN token.ended_at IS 'UTC; signed out, revoked or account disabled';

CREATE TABLE site_key (
    singleton boolean NOT NULL DEFAULT true,
    ca_certificate bytea NOT NULL,
    ca_key_sealed bytea NOT NULL,
    note_key_sealed bytea NOT NULL,
    note_verifier text NOT NULL,
    origin text NOT NULL,
    created_at timestamptz NOT NULL,
    CONSTRAINT pk_site_key PRIMARY KEY (singleton),
    CONSTRAINT ck_site_key_singleton CHECK (singleton)
);
COMMENT ON TABLE site_key IS 'The site''s authority and checkpoint key; private parts sealed under a key kept outside the database.';
COMMENT ON COLUMN site_key.created_at IS 'UTC';

CREATE TABLE person_key (
    certificate_sha256 bytea NOT NULL,
    account text NOT NULL,
    certificate bytea NOT NULL,
    wrapped_key bytea NOT NULL,
    enrolled_by text NOT NULL,
    created_at timestamptz NOT NULL,
    CONSTRAINT pk_person_key PRIMARY KEY (certificate_sha256),
    CONSTRAINT fk_person_key_account FOREIGN KEY (account) REFERENCES account (name),
    CONSTRAINT ck_person_key_sha256 CHECK (certificate_sha256 = sha256(certificate))
);
CREATE INDEX ix_person_key_account ON person_key (account, created_at);
COMMENT ON TABLE person_key IS 'Signing keys of people, wrapped under their signing passphrases.';
COMMENT ON COLUMN person_key.certificate IS 'DER';
COMMENT ON COLUMN person_key.wrapped_key IS 'private key and the parameters of its wrapping';
COMMENT ON COLUMN person_key.created_at IS 'UTC';

CREATE TABLE revocation (
    certificate_sha256 bytea NOT NULL,
    revoked_at timestamptz NOT NULL,
    revoked_by text NOT NULL,
    reason text NOT NULL,
    CONSTRAINT pk_revocation PRIMARY KEY (certificate_sha256),
    CONSTRAINT fk_revocation_person_key FOREIGN KEY (certificate_sha256) REFERENCES person_key (certificate_sha256)
);
COMMENT ON TABLE revocation IS 'Certificates that sign no more; what they signed before stays good.';
COMMENT ON COLUMN revocation.revoked_at IS 'UTC';

CREATE TABLE signature (
    change_request_id bigint NOT NULL,
    number integer NOT NULL,
    round integer NOT NULL,
    signer text NOT NULL,
    signer_name text NOT NULL,
    role text NOT NULL,
    meaning text NOT NULL,
    signed_at timestamptz NOT NULL,
    certificate_sha256 bytea NOT NULL,
    manifest bytea NOT NULL,
    cms bytea NOT NULL,
    CONSTRAINT pk_signature PRIMARY KEY (change_request_id, number),
    CONSTRAINT fk_signature_change_request FOREIGN KEY (change_request_id) REFERENCES change_request (id),
    CONSTRAINT fk_signature_person_key FOREIGN KEY (certificate_sha256) REFERENCES person_key (certificate_sha256),
    CONSTRAINT fk_signature_account FOREIGN KEY (signer) REFERENCES account (name),
    CONSTRAINT uq_signature_signer UNIQUE (change_request_id, round, signer)
);
COMMENT ON TABLE signature IS 'Signatures on change requests; one a signer and round.';
COMMENT ON COLUMN signature.round IS 'round of review in which it counts';
COMMENT ON COLUMN signature.signed_at IS 'UTC, of the server''s clock';
COMMENT ON COLUMN signature.manifest IS 'canonical JSON that was signed';
COMMENT ON COLUMN signature.cms IS 'detached CMS, DER';

GRANT SELECT, INSERT, UPDATE ON account, token TO protoledger_application;
GRANT SELECT, INSERT ON site_key, person_key, revocation, signature TO protoledger_application;
