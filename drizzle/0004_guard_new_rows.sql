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
