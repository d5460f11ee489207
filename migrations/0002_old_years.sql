CREATE TABLE "upload_batch" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	"mail_wanted" boolean DEFAULT false NOT NULL,
	"mail_chosen_at" timestamp with time zone NOT NULL,
	"moved_at" timestamp with time zone NOT NULL,
	"ready_at" timestamp with time zone,
	CONSTRAINT "upload_batch_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "upload_batch" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "upload_batch_file" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"batch_id" uuid NOT NULL,
	"ordinal" integer NOT NULL,
	"file_name" text NOT NULL,
	"bytes" bigint NOT NULL,
	"state" text DEFAULT 'announced' NOT NULL,
	"report_id" uuid,
	"refusal" text,
	CONSTRAINT "upload_batch_file_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "upload_batch_file" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "failed_job" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job" text NOT NULL,
	"subject_id" uuid NOT NULL,
	"code" text NOT NULL,
	"sentence" text NOT NULL,
	"gave_up_at" timestamp with time zone NOT NULL,
	"replayed_at" timestamp with time zone,
	"replayed_by" uuid,
	CONSTRAINT "failed_job_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "failed_job" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "page_copy" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"report_id" uuid NOT NULL,
	"page" integer NOT NULL,
	"state" text DEFAULT 'asked' NOT NULL,
	"sentence" text,
	"asked_by" uuid NOT NULL,
	"asked_at" timestamp with time zone NOT NULL,
	"started_at" timestamp with time zone,
	"ready_at" timestamp with time zone,
	"picture_key" text,
	"picture_sha256" text,
	"bundle_key" text,
	"bundle_sha256" text,
	"words_kept" integer,
	"words_masked" integer,
	CONSTRAINT "page_copy_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "page_copy" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "upload_batch" ADD CONSTRAINT "upload_batch_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload_batch_file" ADD CONSTRAINT "upload_batch_file_site_id_batch_id_upload_batch_site_id_id_fk" FOREIGN KEY ("site_id","batch_id") REFERENCES "public"."upload_batch"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload_batch_file" ADD CONSTRAINT "upload_batch_file_site_id_report_id_report_site_id_id_fk" FOREIGN KEY ("site_id","report_id") REFERENCES "public"."report"("site_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "failed_job" ADD CONSTRAINT "failed_job_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "page_copy" ADD CONSTRAINT "page_copy_site_id_report_id_report_site_id_id_fk" FOREIGN KEY ("site_id","report_id") REFERENCES "public"."report"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "upload_batch_site_created_idx" ON "upload_batch" USING btree ("site_id","created_at" DESC NULLS LAST);--> statement-breakpoint
CREATE UNIQUE INDEX "upload_batch_file_site_batch_ordinal_key" ON "upload_batch_file" USING btree ("site_id","batch_id","ordinal");--> statement-breakpoint
CREATE INDEX "upload_batch_file_site_report_idx" ON "upload_batch_file" USING btree ("site_id","report_id");--> statement-breakpoint
CREATE UNIQUE INDEX "failed_job_open_key" ON "failed_job" USING btree ("site_id","job","subject_id") WHERE replayed_at is null;--> statement-breakpoint
CREATE INDEX "failed_job_site_gave_up_idx" ON "failed_job" USING btree ("site_id","gave_up_at" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "page_copy_site_report_idx" ON "page_copy" USING btree ("site_id","report_id");--> statement-breakpoint
CREATE POLICY "upload_batch_site_rows" ON "upload_batch" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "upload_batch_file_site_rows" ON "upload_batch_file" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "failed_job_site_rows" ON "failed_job" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "page_copy_site_rows" ON "page_copy" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
ALTER TABLE "upload_batch" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "upload_batch_file" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "failed_job" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "page_copy" FORCE ROW LEVEL SECURITY;
