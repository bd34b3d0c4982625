CREATE TABLE "audit" (
	"organisation_id" uuid NOT NULL,
	"id" bigint GENERATED ALWAYS AS IDENTITY (sequence name "audit_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"by" uuid,
	"by_name" text,
	"action" text NOT NULL,
	"subject" text NOT NULL,
	"subject_id" text,
	"before" jsonb,
	"after" jsonb,
	CONSTRAINT "audit_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "audit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "cases" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"number" integer NOT NULL,
	"unit_id" uuid NOT NULL,
	"circuit" text,
	"complaint" text NOT NULL,
	"caller" text,
	"since" text,
	"how_often" text,
	"resets" text,
	"state" text DEFAULT 'open' NOT NULL,
	"assigned_to" uuid,
	"close_reason" text,
	"opened_from" text DEFAULT 'call' NOT NULL,
	"start_ids" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"log_ids" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"timeline" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"opened_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"opened_by" uuid,
	"closed_at" timestamp (3) with time zone,
	CONSTRAINT "cases_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "cases" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "changes" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"client_key" text,
	"unit_id" uuid NOT NULL,
	"circuit" text,
	"case_id" uuid,
	"kind" text NOT NULL,
	"text" text NOT NULL,
	"limit" text,
	"amount" double precision,
	"amount_unit" text,
	"certified_person" text,
	"aimed_at" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"splits" boolean DEFAULT false NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"by" uuid NOT NULL,
	"by_name" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "changes_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "changes" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "checks" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"client_key" text,
	"unit_id" uuid NOT NULL,
	"circuit" text,
	"case_id" uuid,
	"visit_id" uuid,
	"kind" text NOT NULL,
	"readings" jsonb NOT NULL,
	"verdict" text,
	"indicative" boolean DEFAULT false NOT NULL,
	"indicative_reason" text,
	"note" text,
	"at" timestamp (3) with time zone NOT NULL,
	"by" uuid NOT NULL,
	"by_name" text NOT NULL,
	"signed_at" timestamp (3) with time zone,
	"signed_by" uuid,
	"suspect" text,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "checks_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "checks" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "idempotency" (
	"organisation_id" uuid NOT NULL,
	"key" text NOT NULL,
	"request" text NOT NULL,
	"status" integer NOT NULL,
	"body" jsonb,
	"location" text,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_organisation_id_key_pk" PRIMARY KEY("organisation_id","key")
);
--> statement-breakpoint
ALTER TABLE "idempotency" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "mails" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"kind" text NOT NULL,
	"to" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"html" text,
	"attachments" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"tries" integer DEFAULT 0 NOT NULL,
	"error" text,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp (3) with time zone,
	CONSTRAINT "mails_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "mails" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "photos" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"client_key" text,
	"unit_id" uuid NOT NULL,
	"check_id" uuid,
	"caption" text,
	"kind" text DEFAULT 'camera' NOT NULL,
	"original_key" text NOT NULL,
	"view_key" text NOT NULL,
	"width" integer NOT NULL,
	"height" integer NOT NULL,
	"bytes" bigint NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "photos_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "photos" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "trip_words" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"words" text NOT NULL,
	"kind" text NOT NULL,
	CONSTRAINT "trip_words_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "trip_words" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "visits" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"case_id" uuid,
	"date" text NOT NULL,
	"be_there_by" text,
	"technician_id" uuid,
	"arrived_at" timestamp (3) with time zone,
	"left_at" timestamp (3) with time zone,
	"purpose" text,
	"access_notes" text,
	"result" text,
	"created_by" uuid,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "visits_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "visits" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "api_keys" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"organisation_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"name" text NOT NULL,
	"key_hash" text NOT NULL,
	"prefix" text NOT NULL,
	"role" text NOT NULL,
	"scopes" jsonb NOT NULL,
	"site_ids" jsonb,
	"expires_at" timestamp (3) with time zone,
	"used_at" timestamp (3) with time zone,
	"revoked_at" timestamp (3) with time zone,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "members" (
	"organisation_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" text NOT NULL,
	"site_ids" jsonb,
	"left_at" timestamp (3) with time zone,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "members_organisation_id_person_id_pk" PRIMARY KEY("organisation_id","person_id")
);
--> statement-breakpoint
CREATE TABLE "organisations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"settings" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "people" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text,
	"totp_secret" text,
	"totp_confirmed" boolean DEFAULT false NOT NULL,
	"totp_last_step" bigint,
	"recovery_hashes" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"preferences" jsonb DEFAULT '{"units":"ip","paper":"system"}'::jsonb NOT NULL,
	"mail_choices" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "people_email_unique" UNIQUE("email")
);
--> statement-breakpoint
CREATE TABLE "rate_limits" (
	"key" text PRIMARY KEY NOT NULL,
	"points" integer DEFAULT 0 NOT NULL,
	"expire" bigint
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"token_hash" text PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"organisation_id" uuid NOT NULL,
	"user_agent" text,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"seen_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL
);
--> statement-breakpoint
CREATE TABLE "tokens" (
	"token_hash" text PRIMARY KEY NOT NULL,
	"kind" text NOT NULL,
	"organisation_id" uuid,
	"person_id" uuid,
	"data" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"used_at" timestamp (3) with time zone,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "block_times" (
	"organisation_id" uuid NOT NULL,
	"log_id" uuid NOT NULL,
	"part" integer NOT NULL,
	"times" "bytea" NOT NULL,
	CONSTRAINT "block_times_organisation_id_log_id_part_pk" PRIMARY KEY("organisation_id","log_id","part")
);
--> statement-breakpoint
ALTER TABLE "block_times" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "blocks" (
	"organisation_id" uuid NOT NULL,
	"unit_id" uuid NOT NULL,
	"circuit" text NOT NULL,
	"signal" text NOT NULL,
	"log_id" uuid NOT NULL,
	"part" integer NOT NULL,
	"first_at" bigint NOT NULL,
	"last_at" bigint NOT NULL,
	"count" integer NOT NULL,
	"least" real,
	"most" real,
	"change" boolean NOT NULL,
	"increment" real,
	"measure" text,
	"values" "bytea" NOT NULL,
	CONSTRAINT "blocks_organisation_id_unit_id_circuit_signal_log_id_part_pk" PRIMARY KEY("organisation_id","unit_id","circuit","signal","log_id","part")
);
--> statement-breakpoint
ALTER TABLE "blocks" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "circuit_results" (
	"organisation_id" uuid NOT NULL,
	"unit_id" uuid NOT NULL,
	"circuit" text NOT NULL,
	"revision" integer NOT NULL,
	"covered" jsonb NOT NULL,
	"suspects" jsonb NOT NULL,
	"smallest_event_seconds" double precision,
	"alarm_shift" double precision,
	"notes" jsonb NOT NULL,
	"method_version" text NOT NULL,
	"computed_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "circuit_results_organisation_id_unit_id_circuit_pk" PRIMARY KEY("organisation_id","unit_id","circuit")
);
--> statement-breakpoint
ALTER TABLE "circuit_results" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "corrections" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"circuit" text NOT NULL,
	"started_at" bigint NOT NULL,
	"correction" jsonb NOT NULL,
	"reason" text NOT NULL,
	"by" uuid NOT NULL,
	"by_name" text NOT NULL,
	"at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "corrections_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "corrections" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "events" (
	"organisation_id" uuid NOT NULL,
	"log_id" uuid NOT NULL,
	"line" integer NOT NULL,
	"unit_id" uuid NOT NULL,
	"circuit" text NOT NULL,
	"at" bigint NOT NULL,
	"text" text NOT NULL,
	"code" text,
	"severity" text NOT NULL,
	"what" text NOT NULL,
	CONSTRAINT "events_organisation_id_log_id_line_pk" PRIMARY KEY("organisation_id","log_id","line")
);
--> statement-breakpoint
ALTER TABLE "events" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "logs" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"ordinal" bigint GENERATED ALWAYS AS IDENTITY (sequence name "logs_ordinal_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"name" text NOT NULL,
	"bytes" bigint NOT NULL,
	"sha256" text NOT NULL,
	"files" jsonb NOT NULL,
	"options" jsonb NOT NULL,
	"state" text DEFAULT 'received' NOT NULL,
	"progress" real DEFAULT 0 NOT NULL,
	"layout" jsonb,
	"mapping" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"inspection" jsonb,
	"rows" bigint DEFAULT 0 NOT NULL,
	"samples" bigint DEFAULT 0 NOT NULL,
	"first_at" timestamp (3) with time zone,
	"last_at" timestamp (3) with time zone,
	"quality" jsonb,
	"problems" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"created_by" uuid,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"ready_at" timestamp (3) with time zone,
	CONSTRAINT "logs_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "logs" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "remembered_mappings" (
	"organisation_id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"signature" text NOT NULL,
	"mapping" jsonb NOT NULL,
	"confirmed_by" uuid,
	"confirmed_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "remembered_mappings_organisation_id_site_id_signature_pk" PRIMARY KEY("organisation_id","site_id","signature")
);
--> statement-breakpoint
ALTER TABLE "remembered_mappings" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "starts" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"circuit" text NOT NULL,
	"started_at" bigint NOT NULL,
	"ended_at" bigint,
	"outcome" text NOT NULL,
	"record" jsonb NOT NULL,
	CONSTRAINT "starts_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "starts" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "text_blocks" (
	"organisation_id" uuid NOT NULL,
	"unit_id" uuid NOT NULL,
	"circuit" text NOT NULL,
	"signal" text NOT NULL,
	"log_id" uuid NOT NULL,
	"part" integer NOT NULL,
	"first_at" bigint NOT NULL,
	"last_at" bigint NOT NULL,
	"words" jsonb NOT NULL,
	CONSTRAINT "text_blocks_organisation_id_unit_id_circuit_signal_log_id_part_pk" PRIMARY KEY("organisation_id","unit_id","circuit","signal","log_id","part")
);
--> statement-breakpoint
ALTER TABLE "text_blocks" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sites" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"time_zone" text NOT NULL,
	"address" text,
	"altitude" double precision,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "sites_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "sites" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "unit_limits" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"key" text NOT NULL,
	"value" double precision NOT NULL,
	"provenance" text NOT NULL,
	"valid_from" timestamp (3) with time zone,
	"note" text,
	"set_by" uuid,
	"set_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"retired_at" timestamp (3) with time zone,
	CONSTRAINT "unit_limits_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "unit_limits" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "units" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"site_id" uuid NOT NULL,
	"tag" text NOT NULL,
	"refrigerant" text NOT NULL,
	"circuits" integer NOT NULL,
	"nature" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"revision" integer DEFAULT 0 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "units_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "units" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "audit" ADD CONSTRAINT "audit_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "changes" ADD CONSTRAINT "changes_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "changes" ADD CONSTRAINT "changes_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checks" ADD CONSTRAINT "checks_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checks" ADD CONSTRAINT "checks_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "idempotency" ADD CONSTRAINT "idempotency_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mails" ADD CONSTRAINT "mails_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "photos" ADD CONSTRAINT "photos_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "photos" ADD CONSTRAINT "photos_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "trip_words" ADD CONSTRAINT "trip_words_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "trip_words" ADD CONSTRAINT "trip_words_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visits" ADD CONSTRAINT "visits_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visits" ADD CONSTRAINT "visits_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "api_keys" ADD CONSTRAINT "api_keys_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "api_keys" ADD CONSTRAINT "api_keys_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "members" ADD CONSTRAINT "members_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "members" ADD CONSTRAINT "members_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sessions" ADD CONSTRAINT "sessions_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tokens" ADD CONSTRAINT "tokens_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tokens" ADD CONSTRAINT "tokens_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "block_times" ADD CONSTRAINT "block_times_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "block_times" ADD CONSTRAINT "block_times_organisation_id_log_id_logs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","log_id") REFERENCES "public"."logs"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "blocks" ADD CONSTRAINT "blocks_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "blocks" ADD CONSTRAINT "blocks_organisation_id_log_id_logs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","log_id") REFERENCES "public"."logs"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "circuit_results" ADD CONSTRAINT "circuit_results_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "circuit_results" ADD CONSTRAINT "circuit_results_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrections" ADD CONSTRAINT "corrections_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrections" ADD CONSTRAINT "corrections_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "events" ADD CONSTRAINT "events_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "events" ADD CONSTRAINT "events_organisation_id_log_id_logs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","log_id") REFERENCES "public"."logs"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "logs" ADD CONSTRAINT "logs_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "logs" ADD CONSTRAINT "logs_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "remembered_mappings" ADD CONSTRAINT "remembered_mappings_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "starts" ADD CONSTRAINT "starts_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "starts" ADD CONSTRAINT "starts_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "text_blocks" ADD CONSTRAINT "text_blocks_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "text_blocks" ADD CONSTRAINT "text_blocks_organisation_id_log_id_logs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","log_id") REFERENCES "public"."logs"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sites" ADD CONSTRAINT "sites_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "unit_limits" ADD CONSTRAINT "unit_limits_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "unit_limits" ADD CONSTRAINT "unit_limits_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "units" ADD CONSTRAINT "units_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "units" ADD CONSTRAINT "units_organisation_id_site_id_sites_organisation_id_id_fk" FOREIGN KEY ("organisation_id","site_id") REFERENCES "public"."sites"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "cases_organisation_id_number_index" ON "cases" USING btree ("organisation_id","number");--> statement-breakpoint
CREATE INDEX "cases_organisation_id_unit_id_index" ON "cases" USING btree ("organisation_id","unit_id");--> statement-breakpoint
CREATE UNIQUE INDEX "changes_organisation_id_client_key_index" ON "changes" USING btree ("organisation_id","client_key");--> statement-breakpoint
CREATE INDEX "changes_organisation_id_unit_id_index" ON "changes" USING btree ("organisation_id","unit_id");--> statement-breakpoint
CREATE UNIQUE INDEX "checks_organisation_id_client_key_index" ON "checks" USING btree ("organisation_id","client_key");--> statement-breakpoint
CREATE INDEX "checks_organisation_id_unit_id_index" ON "checks" USING btree ("organisation_id","unit_id");--> statement-breakpoint
CREATE INDEX "mails_organisation_id_created_at_index" ON "mails" USING btree ("organisation_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "photos_organisation_id_client_key_index" ON "photos" USING btree ("organisation_id","client_key");--> statement-breakpoint
CREATE INDEX "photos_organisation_id_check_id_index" ON "photos" USING btree ("organisation_id","check_id");--> statement-breakpoint
CREATE INDEX "visits_organisation_id_unit_id_index" ON "visits" USING btree ("organisation_id","unit_id");--> statement-breakpoint
CREATE UNIQUE INDEX "api_keys_key_hash_index" ON "api_keys" USING btree ("key_hash");--> statement-breakpoint
CREATE INDEX "api_keys_organisation_id_index" ON "api_keys" USING btree ("organisation_id");--> statement-breakpoint
CREATE INDEX "members_person_id_index" ON "members" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "sessions_person_id_index" ON "sessions" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "blocks_organisation_id_log_id_index" ON "blocks" USING btree ("organisation_id","log_id");--> statement-breakpoint
CREATE INDEX "corrections_organisation_id_unit_id_index" ON "corrections" USING btree ("organisation_id","unit_id");--> statement-breakpoint
CREATE INDEX "events_organisation_id_unit_id_at_index" ON "events" USING btree ("organisation_id","unit_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "logs_organisation_id_unit_id_sha256_index" ON "logs" USING btree ("organisation_id","unit_id","sha256");--> statement-breakpoint
CREATE UNIQUE INDEX "starts_organisation_id_unit_id_circuit_started_at_index" ON "starts" USING btree ("organisation_id","unit_id","circuit","started_at");--> statement-breakpoint
CREATE INDEX "text_blocks_organisation_id_log_id_index" ON "text_blocks" USING btree ("organisation_id","log_id");--> statement-breakpoint
CREATE UNIQUE INDEX "sites_organisation_id_name_index" ON "sites" USING btree ("organisation_id","name");--> statement-breakpoint
CREATE INDEX "unit_limits_organisation_id_unit_id_index" ON "unit_limits" USING btree ("organisation_id","unit_id");--> statement-breakpoint
CREATE UNIQUE INDEX "units_organisation_id_site_id_tag_index" ON "units" USING btree ("organisation_id","site_id","tag");--> statement-breakpoint
CREATE POLICY "own_rows" ON "audit" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "cases" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "changes" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "checks" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "idempotency" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "mails" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "photos" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "trip_words" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "visits" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "block_times" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "blocks" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "circuit_results" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "corrections" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "events" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "logs" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "remembered_mappings" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "starts" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "text_blocks" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "sites" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "unit_limits" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "units" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);