-- The application's own role owns these tables, so row-level security must be forced on the owner too.
DO $$
DECLARE name text;
BEGIN
	FOR name IN SELECT table_name FROM information_schema.columns
		WHERE table_schema = 'public' AND column_name = 'organisation_id'
		AND table_name NOT IN ('members', 'sessions', 'api_keys', 'tokens')
	LOOP
		EXECUTE format('ALTER TABLE %I FORCE ROW LEVEL SECURITY', name);
	END LOOP;
END $$;
--> statement-breakpoint
-- Blocks are compressed by the product: PostgreSQL must not try again.
ALTER TABLE "blocks" ALTER COLUMN "values" SET STORAGE EXTERNAL;
--> statement-breakpoint
ALTER TABLE "block_times" ALTER COLUMN "times" SET STORAGE EXTERNAL;
--> statement-breakpoint
-- The audit trail is append only: rows leave only with their whole organisation.
CREATE FUNCTION audit_is_append_only() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	RAISE EXCEPTION 'the audit trail is append only';
END $$;
--> statement-breakpoint
CREATE TRIGGER audit_append_only BEFORE UPDATE ON "audit" FOR EACH ROW EXECUTE FUNCTION audit_is_append_only();
