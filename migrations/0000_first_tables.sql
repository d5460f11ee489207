CREATE TABLE "application" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"plot_id" uuid NOT NULL,
	"plan_id" uuid NOT NULL,
	"plan_line_id" uuid NOT NULL,
	"material" jsonb NOT NULL,
	"amount_kg" numeric NOT NULL,
	"amount_printed" text NOT NULL,
	"area_m2" numeric NOT NULL,
	"applied_on" date NOT NULL,
	"depth_cm" numeric,
	"method" text DEFAULT '' NOT NULL,
	"soil_condition" text DEFAULT '' NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"recorded_by" uuid NOT NULL,
	"recorded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"supersedes_id" uuid,
	"superseded_at" timestamp with time zone,
	"superseded_reason" text,
	CONSTRAINT "application_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "application" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "effect_check" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"plot_id" uuid NOT NULL,
	"plan_intent_id" uuid NOT NULL,
	"inputs" jsonb NOT NULL,
	"outcome" jsonb NOT NULL,
	"verdict" text NOT NULL,
	"rule_version" text NOT NULL,
	"computed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "effect_check_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "effect_check" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "plan" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"plot_id" uuid NOT NULL,
	"year" integer NOT NULL,
	"state" text DEFAULT 'draft' NOT NULL,
	"from_application" boolean DEFAULT false NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"adopted_at" timestamp with time zone,
	CONSTRAINT "plan_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "plan" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "plan_intent" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"plan_id" uuid NOT NULL,
	"analyte" text NOT NULL,
	"unit" text,
	"full_change" numeric NOT NULL,
	"low" numeric,
	"high" numeric,
	"source" text NOT NULL,
	CONSTRAINT "plan_intent_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "plan_intent" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "plan_line" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"plan_id" uuid NOT NULL,
	"material" jsonb NOT NULL,
	"amount_kg" numeric NOT NULL,
	"area_m2" numeric NOT NULL,
	CONSTRAINT "plan_line_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "plan_line" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reminder" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"rule_id" uuid NOT NULL,
	"plot_id" uuid NOT NULL,
	"due_on" date NOT NULL,
	"reason" text DEFAULT '' NOT NULL,
	"state" text DEFAULT 'open' NOT NULL,
	"closed_by" uuid,
	"closed_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "reminder_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "reminder" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reminder_rule" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"plot_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"active" boolean DEFAULT true NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "reminder_rule_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "reminder_rule" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reminder_snooze" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"reminder_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"until" date NOT NULL,
	CONSTRAINT "reminder_snooze_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "reminder_snooze" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "clock_offset" (
	"only_row" boolean PRIMARY KEY DEFAULT true NOT NULL,
	"seconds" integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE "mail_preference" (
	"person_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"wanted" boolean NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "mail_preference_person_id_kind_pk" PRIMARY KEY("person_id","kind")
);
--> statement-breakpoint
CREATE TABLE "outbox" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid,
	"to_address" text NOT NULL,
	"kind" text NOT NULL,
	"dedupe_key" text NOT NULL,
	"subject" text NOT NULL,
	"html" text NOT NULL,
	"text" text NOT NULL,
	"headers" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"attachments" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"first_tried_at" timestamp with time zone,
	"sent_at" timestamp with time zone,
	"provider_id" text,
	"last_error" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "outbox_item" (
	"outbox_id" uuid NOT NULL,
	"reminder_id" uuid NOT NULL,
	"due_on" date NOT NULL,
	CONSTRAINT "outbox_item_outbox_id_reminder_id_pk" PRIMARY KEY("outbox_id","reminder_id")
);
--> statement-breakpoint
CREATE TABLE "person" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"password_hash" text NOT NULL,
	"email_verified_at" timestamp with time zone,
	"disabled_at" timestamp with time zone,
	"units" text DEFAULT 'us' NOT NULL,
	"locale" text DEFAULT 'en-US' NOT NULL,
	"paper" text DEFAULT 'letter' NOT NULL,
	"time_zone" text DEFAULT 'America/New_York' NOT NULL,
	"mail_hour" integer DEFAULT 7 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "session" (
	"id" text PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"shared_computer" boolean DEFAULT false NOT NULL,
	"user_agent" text
);
--> statement-breakpoint
CREATE TABLE "sign_in_attempt" (
	"key" varchar(255) PRIMARY KEY NOT NULL,
	"points" integer DEFAULT 0 NOT NULL,
	"expire" bigint
);
--> statement-breakpoint
CREATE TABLE "token" (
	"id" text PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"purpose" text NOT NULL,
	"email" text NOT NULL,
	"payload" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "laboratory" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"other_spellings" text[] DEFAULT '{}' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "laboratory_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "laboratory" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reading_row" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"report_id" uuid NOT NULL,
	"report_sample_id" uuid NOT NULL,
	"ordinal" integer NOT NULL,
	"analyte" text,
	"label" text DEFAULT '' NOT NULL,
	"printed" text DEFAULT '' NOT NULL,
	"value" numeric,
	"qualifier" text DEFAULT '=' NOT NULL,
	"unit" text,
	"unit_printed" text,
	"form" text,
	"method" text,
	"method_printed" text,
	"rating" text,
	"is_primary" boolean DEFAULT true NOT NULL,
	"page" integer,
	"box" jsonb,
	"cell" jsonb,
	"confidence" double precision,
	"doubts" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"state" text DEFAULT 'proposed' NOT NULL,
	"original" jsonb,
	"version" integer DEFAULT 1 NOT NULL,
	"edited_by" uuid,
	"edited_at" timestamp with time zone,
	CONSTRAINT "reading_row_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "reading_row" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "recommendation" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"report_id" uuid NOT NULL,
	"report_sample_id" uuid,
	"item" text NOT NULL,
	"amount" numeric,
	"printed" text NOT NULL,
	"unit" text,
	"page" integer,
	"box" jsonb,
	CONSTRAINT "recommendation_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "recommendation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "report" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"origin" text DEFAULT 'file' NOT NULL,
	"state" text NOT NULL,
	"file_key" text,
	"sha256" text,
	"file_name" text,
	"content_type" text,
	"bytes" integer,
	"pages" integer,
	"pages_read" integer DEFAULT 0 NOT NULL,
	"revision" integer DEFAULT 1 NOT NULL,
	"reader_version" text,
	"layout_fingerprint" text,
	"refusal_code" text,
	"refusal_sentence" text,
	"warnings" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"laboratory_id" uuid,
	"laboratory_printed" text,
	"dropped_on_plot_id" uuid,
	"uploaded_by" uuid NOT NULL,
	"uploaded_at" timestamp with time zone DEFAULT now() NOT NULL,
	"reading_started_at" timestamp with time zone,
	"confirmed_by" uuid,
	"confirmed_at" timestamp with time zone,
	"withdrawn_reason" text,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "report_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "report" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "report_sample" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"report_id" uuid NOT NULL,
	"ordinal" integer NOT NULL,
	"printed_name" text,
	"lab_number" text,
	"field_name" text,
	"sampled_printed" text,
	"reported_on" date,
	"reported_printed" text,
	"plot_id" uuid,
	"taken_on" date,
	"depth_from_cm" numeric,
	"depth_to_cm" numeric,
	"cores" integer,
	"composite" integer DEFAULT 1 NOT NULL,
	"left_out_reason" text,
	"same_as_id" uuid,
	"sample_id" uuid,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "report_sample_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "report_sample" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "result" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"sample_id" uuid NOT NULL,
	"report_id" uuid NOT NULL,
	"report_sample_id" uuid NOT NULL,
	"reading_row_id" uuid,
	"analysis" integer DEFAULT 1 NOT NULL,
	"plot_id" uuid NOT NULL,
	"taken_on" date NOT NULL,
	"depth_from_cm" numeric,
	"depth_to_cm" numeric,
	"laboratory_id" uuid,
	"analyte" text NOT NULL,
	"method" text,
	"form" text,
	"unit" text,
	"unit_basis" text NOT NULL,
	"value" numeric,
	"value_si" numeric,
	"qualifier" text NOT NULL,
	"printed" text NOT NULL,
	"unit_printed" text,
	"confirmed_by" uuid NOT NULL,
	"confirmed_at" timestamp with time zone DEFAULT now() NOT NULL,
	"supersedes_id" uuid,
	"superseded_at" timestamp with time zone,
	"superseded_reason" text,
	CONSTRAINT "result_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "result" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sample" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"plot_id" uuid NOT NULL,
	"taken_on" date NOT NULL,
	"depth_from_cm" numeric,
	"depth_to_cm" numeric,
	"cores" integer,
	"composite" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "sample_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "sample" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "audit_event" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"person_id" uuid,
	"act" text NOT NULL,
	"object_kind" text NOT NULL,
	"object_id" text NOT NULL,
	"detail" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"request_id" text,
	CONSTRAINT "audit_event_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "audit_event" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "invitation" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"role" text NOT NULL,
	"token_hash" text NOT NULL,
	"state" text DEFAULT 'open' NOT NULL,
	"invited_by" uuid NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"answered_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "invitation_site_id_id_pk" PRIMARY KEY("site_id","id"),
	CONSTRAINT "invitation_token_hash_unique" UNIQUE("token_hash")
);
--> statement-breakpoint
ALTER TABLE "invitation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "membership" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "membership_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "membership" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "planting" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"plot_id" uuid NOT NULL,
	"year" integer NOT NULL,
	"crop" text NOT NULL,
	"target_set_key" text,
	"target_set_id" uuid,
	"planned_on" date,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "planting_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "planting" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "plot" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"outline" jsonb NOT NULL,
	"outline_since" date,
	"area_typed_m2" numeric,
	"texture" text,
	"established" boolean DEFAULT true NOT NULL,
	"free_lime_seen" boolean DEFAULT false NOT NULL,
	"target_set_key" text,
	"target_set_id" uuid,
	"notes" text DEFAULT '' NOT NULL,
	"archived_at" timestamp with time zone,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "plot_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "plot" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "site" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"country" text DEFAULT 'US' NOT NULL,
	"hemisphere" text DEFAULT 'north' NOT NULL,
	"time_zone" text DEFAULT 'America/New_York' NOT NULL,
	"warm_months" boolean[] NOT NULL,
	"plan_width_m" numeric DEFAULT '40' NOT NULL,
	"plan_height_m" numeric DEFAULT '25' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "site" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "target" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"target_set_id" uuid NOT NULL,
	"analyte" text NOT NULL,
	"low" numeric NOT NULL,
	"high" numeric NOT NULL,
	"unit" text,
	"method" text,
	CONSTRAINT "target_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "target" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "target_set" (
	"site_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"key" text NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"name" text NOT NULL,
	"valid_from" date NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "target_set_site_id_id_pk" PRIMARY KEY("site_id","id")
);
--> statement-breakpoint
ALTER TABLE "target_set" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "application" ADD CONSTRAINT "application_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "application" ADD CONSTRAINT "application_site_id_plan_id_plan_site_id_id_fk" FOREIGN KEY ("site_id","plan_id") REFERENCES "public"."plan"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "application" ADD CONSTRAINT "application_site_id_plan_line_id_plan_line_site_id_id_fk" FOREIGN KEY ("site_id","plan_line_id") REFERENCES "public"."plan_line"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "effect_check" ADD CONSTRAINT "effect_check_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "effect_check" ADD CONSTRAINT "effect_check_site_id_plan_intent_id_plan_intent_site_id_id_fk" FOREIGN KEY ("site_id","plan_intent_id") REFERENCES "public"."plan_intent"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "plan" ADD CONSTRAINT "plan_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "plan_intent" ADD CONSTRAINT "plan_intent_site_id_plan_id_plan_site_id_id_fk" FOREIGN KEY ("site_id","plan_id") REFERENCES "public"."plan"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "plan_line" ADD CONSTRAINT "plan_line_site_id_plan_id_plan_site_id_id_fk" FOREIGN KEY ("site_id","plan_id") REFERENCES "public"."plan"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reminder" ADD CONSTRAINT "reminder_site_id_rule_id_reminder_rule_site_id_id_fk" FOREIGN KEY ("site_id","rule_id") REFERENCES "public"."reminder_rule"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reminder" ADD CONSTRAINT "reminder_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reminder_rule" ADD CONSTRAINT "reminder_rule_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reminder_snooze" ADD CONSTRAINT "reminder_snooze_site_id_reminder_id_reminder_site_id_id_fk" FOREIGN KEY ("site_id","reminder_id") REFERENCES "public"."reminder"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mail_preference" ADD CONSTRAINT "mail_preference_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "outbox" ADD CONSTRAINT "outbox_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "outbox_item" ADD CONSTRAINT "outbox_item_outbox_id_outbox_id_fk" FOREIGN KEY ("outbox_id") REFERENCES "public"."outbox"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "token" ADD CONSTRAINT "token_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "laboratory" ADD CONSTRAINT "laboratory_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading_row" ADD CONSTRAINT "reading_row_site_id_report_id_report_site_id_id_fk" FOREIGN KEY ("site_id","report_id") REFERENCES "public"."report"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading_row" ADD CONSTRAINT "reading_row_site_id_report_sample_id_report_sample_site_id_id_fk" FOREIGN KEY ("site_id","report_sample_id") REFERENCES "public"."report_sample"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recommendation" ADD CONSTRAINT "recommendation_site_id_report_id_report_site_id_id_fk" FOREIGN KEY ("site_id","report_id") REFERENCES "public"."report"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report" ADD CONSTRAINT "report_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report" ADD CONSTRAINT "report_site_id_laboratory_id_laboratory_site_id_id_fk" FOREIGN KEY ("site_id","laboratory_id") REFERENCES "public"."laboratory"("site_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report" ADD CONSTRAINT "report_site_id_dropped_on_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","dropped_on_plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_sample" ADD CONSTRAINT "report_sample_site_id_report_id_report_site_id_id_fk" FOREIGN KEY ("site_id","report_id") REFERENCES "public"."report"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_sample" ADD CONSTRAINT "report_sample_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_sample" ADD CONSTRAINT "report_sample_site_id_sample_id_sample_site_id_id_fk" FOREIGN KEY ("site_id","sample_id") REFERENCES "public"."sample"("site_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "result" ADD CONSTRAINT "result_site_id_sample_id_sample_site_id_id_fk" FOREIGN KEY ("site_id","sample_id") REFERENCES "public"."sample"("site_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "result" ADD CONSTRAINT "result_site_id_report_id_report_site_id_id_fk" FOREIGN KEY ("site_id","report_id") REFERENCES "public"."report"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "result" ADD CONSTRAINT "result_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "result" ADD CONSTRAINT "result_site_id_laboratory_id_laboratory_site_id_id_fk" FOREIGN KEY ("site_id","laboratory_id") REFERENCES "public"."laboratory"("site_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sample" ADD CONSTRAINT "sample_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "planting" ADD CONSTRAINT "planting_site_id_plot_id_plot_site_id_id_fk" FOREIGN KEY ("site_id","plot_id") REFERENCES "public"."plot"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "plot" ADD CONSTRAINT "plot_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "target" ADD CONSTRAINT "target_site_id_target_set_id_target_set_site_id_id_fk" FOREIGN KEY ("site_id","target_set_id") REFERENCES "public"."target_set"("site_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "target_set" ADD CONSTRAINT "target_set_site_id_site_id_fk" FOREIGN KEY ("site_id") REFERENCES "public"."site"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "application_site_plot_day_idx" ON "application" USING btree ("site_id","plot_id","applied_on" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "effect_check_site_intent_idx" ON "effect_check" USING btree ("site_id","plan_intent_id","computed_at" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "plan_site_plot_idx" ON "plan" USING btree ("site_id","plot_id");--> statement-breakpoint
CREATE UNIQUE INDEX "plan_intent_site_plan_analyte_key" ON "plan_intent" USING btree ("site_id","plan_id","analyte");--> statement-breakpoint
CREATE UNIQUE INDEX "reminder_site_rule_due_key" ON "reminder" USING btree ("site_id","rule_id","due_on");--> statement-breakpoint
CREATE INDEX "reminder_open_due_idx" ON "reminder" USING btree ("due_on") WHERE state = 'open';--> statement-breakpoint
CREATE UNIQUE INDEX "reminder_rule_site_plot_kind_key" ON "reminder_rule" USING btree ("site_id","plot_id","kind");--> statement-breakpoint
CREATE UNIQUE INDEX "reminder_snooze_site_reminder_person_key" ON "reminder_snooze" USING btree ("site_id","reminder_id","person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "outbox_person_kind_dedupe_key" ON "outbox" USING btree ("to_address","kind","dedupe_key");--> statement-breakpoint
CREATE INDEX "outbox_state_idx" ON "outbox" USING btree ("state","created_at");--> statement-breakpoint
CREATE INDEX "outbox_item_reminder_idx" ON "outbox_item" USING btree ("reminder_id");--> statement-breakpoint
CREATE UNIQUE INDEX "person_email_key" ON "person" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "session_person_idx" ON "session" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "token_person_purpose_idx" ON "token" USING btree ("person_id","purpose");--> statement-breakpoint
CREATE UNIQUE INDEX "laboratory_site_name_key" ON "laboratory" USING btree ("site_id",lower("name"));--> statement-breakpoint
CREATE INDEX "reading_row_site_report_idx" ON "reading_row" USING btree ("site_id","report_id","ordinal");--> statement-breakpoint
CREATE UNIQUE INDEX "report_site_sha256_revision_key" ON "report" USING btree ("site_id","sha256","revision");--> statement-breakpoint
CREATE INDEX "report_site_uploaded_idx" ON "report" USING btree ("site_id","uploaded_at" DESC NULLS LAST);--> statement-breakpoint
CREATE UNIQUE INDEX "report_sample_site_report_ordinal_key" ON "report_sample" USING btree ("site_id","report_id","ordinal");--> statement-breakpoint
CREATE UNIQUE INDEX "result_live_key" ON "result" USING btree ("site_id","sample_id","analysis","analyte",coalesce("method", ''),coalesce("form", ''),"unit_basis") WHERE superseded_at is null;--> statement-breakpoint
CREATE INDEX "sample_site_plot_day_idx" ON "sample" USING btree ("site_id","plot_id","taken_on" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "audit_event_site_at_idx" ON "audit_event" USING btree ("site_id","at" DESC NULLS LAST);--> statement-breakpoint
CREATE UNIQUE INDEX "invitation_site_open_email_key" ON "invitation" USING btree ("site_id",lower("email")) WHERE state = 'open';--> statement-breakpoint
CREATE UNIQUE INDEX "membership_site_person_key" ON "membership" USING btree ("site_id","person_id");--> statement-breakpoint
CREATE INDEX "membership_person_idx" ON "membership" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "planting_site_plot_year_crop_key" ON "planting" USING btree ("site_id","plot_id","year","crop");--> statement-breakpoint
CREATE UNIQUE INDEX "plot_site_name_key" ON "plot" USING btree ("site_id",lower("name")) WHERE archived_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "target_site_set_analyte_key" ON "target" USING btree ("site_id","target_set_id","analyte");--> statement-breakpoint
CREATE UNIQUE INDEX "target_set_site_key_version_key" ON "target_set" USING btree ("site_id","key","version");--> statement-breakpoint
CREATE POLICY "application_site_rows" ON "application" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "effect_check_site_rows" ON "effect_check" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "plan_site_rows" ON "plan" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "plan_intent_site_rows" ON "plan_intent" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "plan_line_site_rows" ON "plan_line" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "reminder_site_rows" ON "reminder" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "reminder_rule_site_rows" ON "reminder_rule" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "reminder_snooze_site_rows" ON "reminder_snooze" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "laboratory_site_rows" ON "laboratory" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "reading_row_site_rows" ON "reading_row" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "recommendation_site_rows" ON "recommendation" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "report_site_rows" ON "report" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "report_sample_site_rows" ON "report_sample" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "result_site_rows" ON "result" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "sample_site_rows" ON "sample" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "audit_event_site_rows" ON "audit_event" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "invitation_site_rows" ON "invitation" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "membership_site_rows" ON "membership" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "planting_site_rows" ON "planting" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "plot_site_rows" ON "plot" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "site_site_rows" ON "site" AS PERMISSIVE FOR ALL TO public USING (id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "target_site_rows" ON "target" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "target_set_site_rows" ON "target_set" AS PERMISSIVE FOR ALL TO public USING (site_id = nullif(current_setting('app.site_id', true), '')::uuid) WITH CHECK (site_id = nullif(current_setting('app.site_id', true), '')::uuid);