-- The audit trail is append only: a line leaves only with its whole organisation, which is gone when the cascade comes.
CREATE FUNCTION audit_lines_stay() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	IF EXISTS (SELECT 1 FROM organisations WHERE id = OLD.organisation_id) THEN
		RAISE EXCEPTION 'the audit trail is append only';
	END IF;
	RETURN OLD;
END $$;
--> statement-breakpoint
CREATE TRIGGER audit_lines_stay BEFORE DELETE ON "audit" FOR EACH ROW EXECUTE FUNCTION audit_lines_stay();
