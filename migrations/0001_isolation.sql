-- Row-level security holds for the owner of the tables too: without FORCE the owner sees every site.
DO $$
DECLARE t text;
BEGIN
  FOR t IN
    SELECT c.relname FROM pg_class c JOIN pg_namespace n ON n.oid = c.relnamespace
    WHERE n.nspname = 'public' AND c.relkind = 'r' AND c.relrowsecurity
  LOOP
    EXECUTE format('ALTER TABLE public.%I FORCE ROW LEVEL SECURITY', t);
  END LOOP;
END $$;
--> statement-breakpoint
CREATE INDEX result_site_plot_analyte_day_idx ON result (site_id, plot_id, analyte, taken_on DESC) INCLUDE (value) WHERE superseded_at IS NULL;
--> statement-breakpoint
CREATE FUNCTION loamline_now() RETURNS timestamptz LANGUAGE sql STABLE SET search_path = public, pg_temp AS
$$ SELECT now() + coalesce((SELECT make_interval(secs => seconds) FROM clock_offset), interval '0') $$;
--> statement-breakpoint
CREATE FUNCTION sites_of_person(person uuid) RETURNS SETOF uuid
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS
$$ SELECT site_id FROM membership WHERE person_id = person $$;
--> statement-breakpoint
CREATE FUNCTION site_of_token(hash text) RETURNS uuid
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS
$$ SELECT site_id FROM invitation WHERE token_hash = hash $$;
--> statement-breakpoint
CREATE FUNCTION due_reminders(latest date) RETURNS TABLE (site_id uuid, reminder_id uuid)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS
$$ SELECT r.site_id, r.id FROM reminder r WHERE r.state = 'open' AND r.due_on <= latest $$;
--> statement-breakpoint
CREATE FUNCTION site_of_mail(reminder uuid) RETURNS uuid
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS
$$ SELECT r.site_id FROM reminder r WHERE r.id = reminder $$;
--> statement-breakpoint
CREATE FUNCTION stale_uploads(before timestamptz) RETURNS TABLE (site_id uuid, report_id uuid)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS
$$ SELECT r.site_id, r.id FROM report r WHERE r.state IN ('received', 'reading') AND coalesce(r.reading_started_at, r.uploaded_at) < before $$;
--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO loamline_app, loamline_backup;
--> statement-breakpoint
GRANT USAGE, CREATE ON SCHEMA public TO loamline_lookup;
--> statement-breakpoint
ALTER FUNCTION sites_of_person(uuid) OWNER TO loamline_lookup;
--> statement-breakpoint
ALTER FUNCTION site_of_token(text) OWNER TO loamline_lookup;
--> statement-breakpoint
ALTER FUNCTION due_reminders(date) OWNER TO loamline_lookup;
--> statement-breakpoint
ALTER FUNCTION site_of_mail(uuid) OWNER TO loamline_lookup;
--> statement-breakpoint
ALTER FUNCTION stale_uploads(timestamptz) OWNER TO loamline_lookup;
--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM loamline_lookup;
--> statement-breakpoint
GRANT SELECT ON membership, invitation, reminder, report TO loamline_lookup;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA public TO loamline_app;
--> statement-breakpoint
GRANT SELECT ON ALL TABLES IN SCHEMA public TO loamline_backup;
--> statement-breakpoint
ALTER DEFAULT PRIVILEGES IN SCHEMA public GRANT SELECT, INSERT, UPDATE, DELETE ON TABLES TO loamline_app;
--> statement-breakpoint
ALTER DEFAULT PRIVILEGES IN SCHEMA public GRANT SELECT ON TABLES TO loamline_backup;
--> statement-breakpoint
-- What is written once stays: the audit trail and confirmed results. Saying that a result was superseded is the one change allowed.
REVOKE UPDATE, DELETE ON audit_event FROM loamline_app;
--> statement-breakpoint
REVOKE UPDATE, DELETE ON result FROM loamline_app;
--> statement-breakpoint
GRANT UPDATE (superseded_at, superseded_reason) ON result TO loamline_app;
--> statement-breakpoint
REVOKE INSERT, UPDATE, DELETE ON clock_offset FROM loamline_app;
--> statement-breakpoint
REVOKE ALL ON FUNCTION sites_of_person(uuid), site_of_token(text), due_reminders(date), site_of_mail(uuid), stale_uploads(timestamptz) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION sites_of_person(uuid), site_of_token(text), due_reminders(date), site_of_mail(uuid), stale_uploads(timestamptz) TO loamline_app;
