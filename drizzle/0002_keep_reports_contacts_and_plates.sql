ALTER TABLE "cases" ADD COLUMN "comparisons" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "cases" ADD COLUMN "watch_from" timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "mails" ADD COLUMN "dedupe_key" text;--> statement-breakpoint
ALTER TABLE "mails" ADD COLUMN "person_id" uuid;--> statement-breakpoint
ALTER TABLE "mails" ADD COLUMN "tried_at" timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "visits" ADD COLUMN "report" jsonb;--> statement-breakpoint
ALTER TABLE "visits" ADD COLUMN "brief_sent_at" timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "people" ADD COLUMN "oidc_subject" text;--> statement-breakpoint
ALTER TABLE "starts" ADD COLUMN "extras" jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "sites" ADD COLUMN "contacts" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "sites" ADD COLUMN "access_notes" text;--> statement-breakpoint
ALTER TABLE "sites" ADD COLUMN "on_call_id" uuid;--> statement-breakpoint
ALTER TABLE "units" ADD COLUMN "name_plate" jsonb DEFAULT '{}'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "units" ADD COLUMN "delivery_hours" double precision;--> statement-breakpoint
ALTER TABLE "units" ADD COLUMN "late_told_at" timestamp (3) with time zone;--> statement-breakpoint
CREATE UNIQUE INDEX "mails_organisation_id_dedupe_key_index" ON "mails" USING btree ("organisation_id","dedupe_key");--> statement-breakpoint
ALTER TABLE "people" ADD CONSTRAINT "people_oidcSubject_unique" UNIQUE("oidc_subject");