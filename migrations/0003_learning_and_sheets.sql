CREATE TABLE "layout_memory" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"report_id" uuid NOT NULL,
	"fingerprint" text NOT NULL,
	"laboratory" text NOT NULL,
	"laboratory_printed" text,
	"shape" text NOT NULL,
	"headings" text[] NOT NULL,
	"lessons" jsonb NOT NULL,
	"learnt_by" uuid NOT NULL,
	"learnt_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "layout_memory_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "layout_memory" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "own_sheet" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"report_id" uuid NOT NULL,
	"cells" jsonb NOT NULL,
	"header_fingerprint" text NOT NULL,
	"proposal" jsonb NOT NULL,
	"mapping" jsonb,
	"mapped_by" uuid,
	"mapped_at" timestamp with time zone,
	CONSTRAINT "own_sheet_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "own_sheet" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sheet_mapping" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"header_fingerprint" text NOT NULL,
	"mapping" jsonb NOT NULL,
	"saved_by" uuid NOT NULL,
	"saved_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "sheet_mapping_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "sheet_mapping" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "reading_row" ADD COLUMN "learnt" jsonb;--> statement-breakpoint
ALTER TABLE "layout_memory" ADD CONSTRAINT "layout_memory_site_id_report_id_report_site_id_id_fk" FOREIGN KEY ("site_id","report_id") REFERENCES "public"."report"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "own_sheet" ADD CONSTRAINT "own_sheet_site_id_report_id_report_site_id_id_fk" FOREIGN KEY ("site_id","report_id") REFERENCES "public"."report"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sheet_mapping" ADD CONSTRAINT "sheet_mapping_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "layout_memory_site_report_key" ON "layout_memory" USING btree ("site_id","report_id");--> statement-breakpoint
CREATE INDEX "layout_memory_site_laboratory_idx" ON "layout_memory" USING btree ("site_id","laboratory","learnt_at" DESC NULLS LAST);--> statement-breakpoint
CREATE UNIQUE INDEX "own_sheet_site_report_key" ON "own_sheet" USING btree ("site_id","report_id");--> statement-breakpoint
CREATE UNIQUE INDEX "sheet_mapping_site_header_key" ON "sheet_mapping" USING btree ("site_id","header_fingerprint");--> statement-breakpoint
CREATE POLICY "layout_memory_site_rows" ON "layout_memory" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_sheet_site_rows" ON "own_sheet" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "sheet_mapping_site_rows" ON "sheet_mapping" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
ALTER TABLE "layout_memory" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "own_sheet" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "sheet_mapping" FORCE ROW LEVEL SECURITY;
