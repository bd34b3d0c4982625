CREATE TABLE "noted" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"client_key" text,
	"unit_id" uuid NOT NULL,
	"circuit" text NOT NULL,
	"at" bigint NOT NULL,
	"body" jsonb NOT NULL,
	"by" uuid NOT NULL,
	"by_name" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "noted_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "noted" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "upload_parts" (
	"organisation_id" uuid NOT NULL,
	"upload_id" uuid NOT NULL,
	"file" integer NOT NULL,
	"begin" bigint NOT NULL,
	"bytes" bigint NOT NULL,
	"key" text NOT NULL,
	CONSTRAINT "upload_parts_organisation_id_upload_id_file_begin_pk" PRIMARY KEY("organisation_id","upload_id","file","begin")
);
--> statement-breakpoint
ALTER TABLE "upload_parts" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "uploads" (
	"organisation_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"unit_id" uuid NOT NULL,
	"files" jsonb NOT NULL,
	"options" jsonb NOT NULL,
	"log_id" uuid,
	"created_by" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "uploads_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "uploads" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "trip_words" ALTER COLUMN "unit_id" DROP NOT NULL;--> statement-breakpoint
ALTER TABLE "trip_words" ADD COLUMN "by_name" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "trip_words" ADD COLUMN "created_at" timestamp (3) with time zone DEFAULT now() NOT NULL;--> statement-breakpoint
ALTER TABLE "starts" ADD COLUMN "source" text DEFAULT 'log' NOT NULL;--> statement-breakpoint
ALTER TABLE "noted" ADD CONSTRAINT "noted_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "noted" ADD CONSTRAINT "noted_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload_parts" ADD CONSTRAINT "upload_parts_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload_parts" ADD CONSTRAINT "upload_parts_organisation_id_upload_id_uploads_organisation_id_id_fk" FOREIGN KEY ("organisation_id","upload_id") REFERENCES "public"."uploads"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "uploads" ADD CONSTRAINT "uploads_organisation_id_organisations_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "uploads" ADD CONSTRAINT "uploads_organisation_id_unit_id_units_organisation_id_id_fk" FOREIGN KEY ("organisation_id","unit_id") REFERENCES "public"."units"("organisation_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "noted_organisation_id_client_key_index" ON "noted" USING btree ("organisation_id","client_key");--> statement-breakpoint
CREATE INDEX "noted_organisation_id_unit_id_at_index" ON "noted" USING btree ("organisation_id","unit_id","at");--> statement-breakpoint
CREATE POLICY "own_rows" ON "noted" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "upload_parts" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_rows" ON "uploads" AS PERMISSIVE FOR ALL TO public USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);