-- Rows that are only ever added: a statement-level trigger refuses even a change that would touch no row, and ALWAYS keeps
-- it firing where a superuser has set session_replication_role.
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION '% is append-only', TG_TABLE_NAME USING ERRCODE = '42501';
END
$$;
--> statement-breakpoint
DO $$
DECLARE
  name text;
BEGIN
  FOREACH name IN ARRAY ARRAY['audit_events', 'audit_seals', 'assessments', 'decisions', 'need_events', 'messages',
    'administrations', 'guidance_versions', 'policy_versions']
  LOOP
    EXECUTE format('CREATE TRIGGER %I BEFORE UPDATE OR DELETE OR TRUNCATE ON %I FOR EACH STATEMENT EXECUTE FUNCTION refuse_change()',
      name || '_append_only', name);
    EXECUTE format('ALTER TABLE %I ENABLE ALWAYS TRIGGER %I', name, name || '_append_only');
  END LOOP;
END
$$;
--> statement-breakpoint
-- A request's pointers must name its own rows.
ALTER TABLE assessments ADD CONSTRAINT assessments_id_request_key UNIQUE (id, request_id);
--> statement-breakpoint
ALTER TABLE decisions ADD CONSTRAINT decisions_id_request_key UNIQUE (id, request_id);
--> statement-breakpoint
ALTER TABLE requests ADD CONSTRAINT requests_own_assessment_fkey
  FOREIGN KEY (current_assessment_id, id) REFERENCES assessments (id, request_id);
--> statement-breakpoint
ALTER TABLE requests ADD CONSTRAINT requests_own_decision_fkey
  FOREIGN KEY (current_decision_id, id) REFERENCES decisions (id, request_id);
--> statement-breakpoint
ALTER TABLE decisions ADD CONSTRAINT decisions_own_assessment_fkey
  FOREIGN KEY (assessment_id, request_id) REFERENCES assessments (id, request_id);
--> statement-breakpoint
-- Two exams never share a scanner's time.
CREATE EXTENSION IF NOT EXISTS btree_gist;
--> statement-breakpoint
ALTER TABLE requests ADD CONSTRAINT requests_slot_excl EXCLUDE USING gist (
  scanner_id WITH =, tstzrange(slot_starts_at, slot_ends_at) WITH &&
) WHERE (slot_starts_at IS NOT NULL AND state IN ('approved', 'booked', 'reopened', 'queried', 'sent'));
--> statement-breakpoint
-- The application's role writes rows; it owns nothing, and may neither choose nor back-date an audit row.
REVOKE ALL ON ALL TABLES IN SCHEMA public FROM PUBLIC;
--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO wherefore_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON practices, users, sessions, invitations, patients, requests, letters, letter_links,
  explanation_visits, installation, scanners TO wherefore_app;
--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON memberships TO wherefore_app;
--> statement-breakpoint
GRANT DELETE ON sessions, explanation_visits, invitations TO wherefore_app;
--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON idempotency_keys TO wherefore_app;
--> statement-breakpoint
GRANT SELECT, INSERT ON assessments, decisions, messages, administrations, guidance_versions, policy_versions, audit_seals
  TO wherefore_app;
--> statement-breakpoint
GRANT SELECT ON need_events, audit_events TO wherefore_app;
--> statement-breakpoint
GRANT INSERT (request_id, kind, state, note, by_id) ON need_events TO wherefore_app;
--> statement-breakpoint
GRANT INSERT (actor_kind, actor_id, actor_name, actor_role, action, object_type, object_id, reference, patient_id, practice_id,
  detail, outcome, request_id) ON audit_events TO wherefore_app;
--> statement-breakpoint
GRANT USAGE ON SEQUENCE request_number TO wherefore_app;
--> statement-breakpoint
-- Shared counters of the rate limiter.
CREATE TABLE rate_limits (
  key varchar(255) PRIMARY KEY,
  points integer NOT NULL DEFAULT 0,
  expire bigint
);
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON rate_limits TO wherefore_app;
