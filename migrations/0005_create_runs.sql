-- After each edit every stored version is predicted again; the numbers are packed and kept by run.
CREATE TABLE run (
    id bigint GENERATED ALWAYS AS IDENTITY,
    cause text NOT NULL,
    change_request_id bigint,
    state text NOT NULL,
    priority smallint NOT NULL,
    model_id text,
    inputs_sha256 bytea,
    queued_at timestamptz NOT NULL,
    started_at timestamptz,
    finished_at timestamptz,
    versions integer NOT NULL DEFAULT 0,
    proposals integer NOT NULL DEFAULT 0,
    results integer NOT NULL DEFAULT 0,
    shared integer NOT NULL DEFAULT 0,
    moved integer NOT NULL DEFAULT 0,
    newly_failing integer NOT NULL DEFAULT 0,
    newly_holding integer NOT NULL DEFAULT 0,
    failed_shards integer NOT NULL DEFAULT 0,
    findings_sha256 bytea,
    CONSTRAINT pk_run PRIMARY KEY (id),
    CONSTRAINT fk_run_change_request FOREIGN KEY (change_request_id) REFERENCES change_request (id),
    CONSTRAINT ck_run_state CHECK (state IN ('queued', 'running', 'completed', 'failed'))
);
CREATE INDEX ix_run_state ON run (state, id);
COMMENT ON TABLE run IS 'Regression runs and their counts.';
COMMENT ON COLUMN run.priority IS 'smaller first';
COMMENT ON COLUMN run.inputs_sha256 IS 'blob that names every input document';
COMMENT ON COLUMN run.queued_at IS 'UTC';
COMMENT ON COLUMN run.started_at IS 'UTC';
COMMENT ON COLUMN run.finished_at IS 'UTC';
COMMENT ON COLUMN run.versions IS 'stored protocol versions evaluated';
COMMENT ON COLUMN run.proposals IS 'proposals under review evaluated';
COMMENT ON COLUMN run.results IS 'result rows';
COMMENT ON COLUMN run.shared IS 'rows that took the numbers of an identical input of the same run';
COMMENT ON COLUMN run.moved IS 'versions whose prediction moved though their document did not';

ALTER TABLE change_request ADD CONSTRAINT fk_change_request_run FOREIGN KEY (run_id) REFERENCES run (id);

CREATE TABLE run_job (
    id bigint GENERATED ALWAYS AS IDENTITY,
    run bigint NOT NULL,
    stage text NOT NULL,
    payload text NOT NULL,
    state text NOT NULL DEFAULT 'queued',
    priority smallint NOT NULL,
    run_after timestamptz NOT NULL DEFAULT now(),
    lease_until timestamptz,
    worker text,
    epoch integer NOT NULL DEFAULT 0,
    attempts integer NOT NULL DEFAULT 0,
    shared integer NOT NULL DEFAULT 0,
    failure text,
    CONSTRAINT pk_run_job PRIMARY KEY (id),
    CONSTRAINT fk_run_job_run FOREIGN KEY (run) REFERENCES run (id),
    CONSTRAINT uq_run_job_shard UNIQUE (run, stage, payload),
    CONSTRAINT ck_run_job_stage CHECK (stage IN ('plan', 'shard', 'finish')),
    CONSTRAINT ck_run_job_state CHECK (state IN ('queued', 'done', 'failed'))
);
CREATE INDEX ix_run_job_queue ON run_job (priority, id) WHERE state = 'queued';
COMMENT ON TABLE run_job IS 'The queue of work: claimed under a lease on this database''s clock, fenced by the epoch.';
COMMENT ON COLUMN run_job.payload IS 'protocol identifier of a shard, empty otherwise';
COMMENT ON COLUMN run_job.run_after IS 'UTC; not claimed before';
COMMENT ON COLUMN run_job.lease_until IS 'UTC; claimable again after';
COMMENT ON COLUMN run_job.epoch IS 'counts claims; a result of an earlier claim is refused';
COMMENT ON COLUMN run_job.shared IS 'result rows shared inside the shard';

CREATE TABLE run_result (
    run bigint NOT NULL,
    protocol text NOT NULL,
    version integer NOT NULL,
    change_request_id bigint NOT NULL,
    scanner text NOT NULL,
    document_sha256 bytea NOT NULL,
    input_sha256 bytea NOT NULL,
    observables_sha256 bytea NOT NULL,
    nominal double precision[] NOT NULL,
    low double precision[] NOT NULL,
    high double precision[] NOT NULL,
    probability double precision[] NOT NULL,
    verdict smallint[] NOT NULL,
    nominal_verdict smallint[] NOT NULL,
    packed_sha256 bytea NOT NULL,
    CONSTRAINT pk_run_result PRIMARY KEY (run, protocol, version, change_request_id, scanner)
) PARTITION BY RANGE (run);
COMMENT ON TABLE run_result IS 'Packed predictions: one row a version or proposal and scanner, arrays against a stored list of observables.';
COMMENT ON COLUMN run_result.version IS 'stored version, 0 for a proposal';
COMMENT ON COLUMN run_result.change_request_id IS 'request of a proposal, 0 for a stored version';
COMMENT ON COLUMN run_result.input_sha256 IS 'SHA-256 over every input document, the sampling and the model';
COMMENT ON COLUMN run_result.observables_sha256 IS 'blob with the lists of observables (n) and expectations (m)';
COMMENT ON COLUMN run_result.nominal IS 'n values, each in its observable''s unit';
COMMENT ON COLUMN run_result.low IS 'n 5 % quantiles';
COMMENT ON COLUMN run_result.high IS 'n 95 % quantiles';
COMMENT ON COLUMN run_result.probability IS 'm probabilities that the expectation holds, in [0, 1]';
COMMENT ON COLUMN run_result.verdict IS 'm: 0 holds, 1 fails, 2 uncertain, 3 not predictable';
COMMENT ON COLUMN run_result.packed_sha256 IS 'SHA-256 over the arrays as computed';

-- The application role cannot create tables; this makes the partition of a run, 64 runs each, and nothing else.
CREATE FUNCTION ensure_run_result_partition(run bigint) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS
$$
DECLARE
    low bigint := run / 64 * 64;
    partition text := 'run_result_' || low;
BEGIN
    IF run < 0 THEN
        RAISE EXCEPTION 'run % is negative', run;
    END IF;
    IF to_regclass(partition) IS NULL THEN
        PERFORM pg_advisory_xact_lock(hashtextextended('run_result_partition', 0));
        IF to_regclass(partition) IS NULL THEN
            EXECUTE format('CREATE TABLE %I PARTITION OF run_result FOR VALUES FROM (%L) TO (%L)', partition, low, low + 64);
        END IF;
    END IF;
END
$$;
REVOKE ALL ON FUNCTION ensure_run_result_partition(bigint) FROM PUBLIC;
GRANT EXECUTE ON FUNCTION ensure_run_result_partition(bigint) TO protoledger_application;

CREATE TABLE report (
    change_request_id bigint NOT NULL,
    round integer NOT NULL,
    document_sha256 bytea NOT NULL,
    run_id bigint NOT NULL,
    model_id text NOT NULL,
    json_sha256 bytea NOT NULL,
    markdown_sha256 bytea NOT NULL,
    html_sha256 bytea NOT NULL,
    inputs_sha256 bytea NOT NULL,
    created_at timestamptz NOT NULL,
    CONSTRAINT pk_report PRIMARY KEY (change_request_id, round, run_id),
    CONSTRAINT fk_report_change_request FOREIGN KEY (change_request_id) REFERENCES change_request (id),
    CONSTRAINT fk_report_run FOREIGN KEY (run_id) REFERENCES run (id),
    CONSTRAINT fk_report_json FOREIGN KEY (json_sha256) REFERENCES blob (sha256),
    CONSTRAINT fk_report_markdown FOREIGN KEY (markdown_sha256) REFERENCES blob (sha256),
    CONSTRAINT fk_report_html FOREIGN KEY (html_sha256) REFERENCES blob (sha256),
    CONSTRAINT fk_report_inputs FOREIGN KEY (inputs_sha256) REFERENCES blob (sha256)
);
COMMENT ON TABLE report IS 'Change reports: their bytes are made once and kept as blobs.';
COMMENT ON COLUMN report.round IS 'round of review of the request';
COMMENT ON COLUMN report.document_sha256 IS 'proposed document that it speaks of';
COMMENT ON COLUMN report.created_at IS 'UTC';

GRANT SELECT, INSERT, UPDATE ON run, run_job TO protoledger_application;
GRANT SELECT, INSERT ON run_result, report TO protoledger_application;
