-- The program must not be able to rewrite history, so it works in a role that owns nothing.
-- The role cannot sign in: the server's own login is a member of it, or the owner switches to it on each connection.
DO $$
BEGIN
    IF NOT EXISTS (SELECT FROM pg_roles WHERE rolname = 'protoledger_application') THEN
        CREATE ROLE protoledger_application NOLOGIN NOINHERIT;
    END IF;
EXCEPTION
    WHEN duplicate_object OR unique_violation THEN NULL;
END
$$;

REVOKE CREATE ON SCHEMA public FROM PUBLIC;
GRANT USAGE ON SCHEMA public TO protoledger_application;
