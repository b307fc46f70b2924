-- What the schema's language cannot say: codes that may change hands within an edit, row-level security,
-- the few functions that look across firms, what the api's and the worker's role may do, and why each index is there.

ALTER TABLE "bus" ADD CONSTRAINT "bus_code_key" UNIQUE ("firm_id", "job_id", "code") DEFERRABLE INITIALLY DEFERRED;
ALTER TABLE "source" ADD CONSTRAINT "source_code_key" UNIQUE ("firm_id", "job_id", "code") DEFERRABLE INITIALLY DEFERRED;
ALTER TABLE "run" ADD CONSTRAINT "run_code_key" UNIQUE ("firm_id", "job_id", "code") DEFERRABLE INITIALLY DEFERRED;
ALTER TABLE "transformer" ADD CONSTRAINT "transformer_code_key" UNIQUE ("firm_id", "job_id", "code") DEFERRABLE INITIALLY DEFERRED;
ALTER TABLE "load" ADD CONSTRAINT "load_code_key" UNIQUE ("firm_id", "job_id", "code") DEFERRABLE INITIALLY DEFERRED;
ALTER TABLE "job_conductor" ADD CONSTRAINT "job_conductor_name_key" UNIQUE ("firm_id", "job_id", "name") DEFERRABLE INITIALLY DEFERRED;
--> statement-breakpoint
ALTER TABLE "token" ADD CONSTRAINT "token_invitation_fkey" FOREIGN KEY ("firm_id", "invitation_id")
  REFERENCES "invitation" ("firm_id", "id") ON DELETE CASCADE;
--> statement-breakpoint
-- Every row belongs to the firm that the transaction named; without a name there are no rows, not even for the owner.
DO $$
DECLARE
  tenant text;
BEGIN
  FOREACH tenant IN ARRAY ARRAY[
    'firm', 'membership', 'invitation', 'limit_preset', 'preset_limit', 'default_value', 'conductor_row', 'audit_event',
    'job', 'job_limit', 'job_verdict', 'job_edit', 'bus', 'source', 'panel', 'circuit', 'breaker', 'run', 'transformer',
    'load', 'job_conductor', 'reading', 'draft', 'revision', 'revision_pdf', 'delivery', 'decision'
  ] LOOP
    EXECUTE format('ALTER TABLE %I ENABLE ROW LEVEL SECURITY', tenant);
    EXECUTE format('ALTER TABLE %I FORCE ROW LEVEL SECURITY', tenant);
    EXECUTE format(
      'CREATE POLICY own_firm ON %I USING (firm_id = (SELECT nullif(current_setting(''farlug.firm'', true), '''')::uuid))',
      tenant
    );
  END LOOP;
END $$;
--> statement-breakpoint
-- The functions below run as the owner; these policies let them look across firms where the owner is no superuser.
CREATE POLICY owner_looks_across ON "firm" FOR SELECT TO CURRENT_USER USING (true);
CREATE POLICY owner_looks_across ON "membership" FOR SELECT TO CURRENT_USER USING (true);
CREATE POLICY owner_looks_across ON "invitation" FOR SELECT TO CURRENT_USER USING (true);
CREATE POLICY owner_looks_across ON "delivery" FOR SELECT TO CURRENT_USER USING (true);
--> statement-breakpoint
-- At sign-in: the firms of a person.
CREATE FUNCTION memberships_of(person uuid)
  RETURNS TABLE (firm_id uuid, firm_name text, role text)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, pg_temp
AS $$
  SELECT m.firm_id, f.name, m.role
  FROM public.membership m JOIN public.firm f ON f.firm_id = m.firm_id
  WHERE m.person_id = person
  ORDER BY f.name, f.firm_id
$$;
--> statement-breakpoint
-- An invitation by the hash of the token that was mailed.
CREATE FUNCTION invitation_of_token(token_hash text)
  RETURNS TABLE (
    firm_id uuid, firm_name text, invitation_id uuid, email text, role text,
    expires_at timestamptz, accepted_at timestamptz, withdrawn_at timestamptz
  )
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, pg_temp
AS $$
  SELECT i.firm_id, f.name, i.id, i.email, i.role, i.expires_at, i.accepted_at, i.withdrawn_at
  FROM public.token t
    JOIN public.invitation i ON i.firm_id = t.firm_id AND i.id = t.invitation_id
    JOIN public.firm f ON f.firm_id = i.firm_id
  WHERE t.hash = token_hash AND t.purpose = 'invite'
$$;
--> statement-breakpoint
-- A delivery by the hash of its link's token.
CREATE FUNCTION delivery_of_link(link_hash text)
  RETURNS TABLE (firm_id uuid, job_id uuid, delivery_id uuid, epoch integer)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, pg_temp
AS $$
  SELECT l.firm_id, l.job_id, l.delivery_id, l.epoch FROM public.link_index l WHERE l.hash = link_hash
$$;
--> statement-breakpoint
-- Deliveries whose worker stopped between "sending" and an answer.
CREATE FUNCTION deliveries_left_sending(since timestamptz)
  RETURNS TABLE (firm_id uuid, job_id uuid, delivery_id uuid)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, pg_temp
AS $$
  SELECT d.firm_id, d.job_id, d.id FROM public.delivery d WHERE d.state = 'sending' AND d.sending_at < since
$$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION memberships_of(uuid), invitation_of_token(text), delivery_of_link(text), deliveries_left_sending(timestamptz) FROM PUBLIC;
GRANT EXECUTE ON FUNCTION memberships_of(uuid), invitation_of_token(text), delivery_of_link(text) TO farlug_api;
GRANT EXECUTE ON FUNCTION deliveries_left_sending(timestamptz) TO farlug_worker;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON "person", "firm", "invitation", "revision_pdf", "delivery" TO farlug_api;
GRANT SELECT, INSERT, UPDATE, DELETE ON
  "session", "token", "rate_counter", "membership", "limit_preset", "preset_limit", "default_value", "conductor_row",
  "job", "job_limit", "job_verdict", "bus", "source", "panel", "circuit", "breaker", "run", "transformer", "load",
  "job_conductor", "reading", "draft" TO farlug_api;
-- What was issued, edited, decided or done is only ever added to.
GRANT SELECT, INSERT ON "revision", "job_edit", "decision", "audit_event" TO farlug_api;
-- A hash that the api knows can be stored and removed; what it leads to is told by delivery_of_link alone.
GRANT INSERT, DELETE, SELECT ("hash") ON "link_index" TO farlug_api;
--> statement-breakpoint
GRANT SELECT ("id", "email", "name", "time_zone") ON "person" TO farlug_worker;
GRANT SELECT ON
  "token", "firm", "invitation", "job", "job_limit", "bus", "source", "panel", "circuit", "breaker", "run",
  "transformer", "load", "job_conductor", "reading", "draft", "revision", "revision_pdf", "delivery", "decision"
  TO farlug_worker;
GRANT UPDATE ON "revision_pdf", "delivery" TO farlug_worker;
GRANT SELECT, INSERT ON "audit_event" TO farlug_worker;
--> statement-breakpoint
CREATE INDEX "delivery_sending_idx" ON "delivery" ("sending_at") WHERE "state" = 'sending';
--> statement-breakpoint
COMMENT ON INDEX "person_email_key" IS 'sign-in, sign-up and invitations: the person of an address, whatever its case';
COMMENT ON INDEX "session_expire_idx" IS 'the session store: sessions to forget';
COMMENT ON INDEX "session_person_idx" IS 'a changed password: the sessions of a person to end';
COMMENT ON INDEX "token_id_key" IS 'the worker: the token that a mail is about';
COMMENT ON INDEX "token_person_idx" IS 'a changed password: the tokens of a person to end';
COMMENT ON INDEX "token_invitation_idx" IS 'a withdrawn invitation: its tokens';
COMMENT ON INDEX "rate_counter_window_start_idx" IS 'windows that are over, to be removed';
COMMENT ON INDEX "link_index_delivery_idx" IS 'the links of a delivery, of whatever epoch';
COMMENT ON INDEX "membership_person_idx" IS 'memberships_of: the firms of a person';
COMMENT ON INDEX "invitation_pending_email_key" IS 'inviting: an address has one open invitation in a firm';
COMMENT ON INDEX "conductor_row_name_key" IS 'saving a size: its name is the only one in the firm';
COMMENT ON INDEX "audit_event_at_idx" IS 'the audit trail, newest first';
COMMENT ON INDEX "job_changed_at_idx" IS 'the list of jobs, last change first';
COMMENT ON INDEX "job_edit_edit_id_key" IS 'an edit that arrives twice is applied once';
COMMENT ON INDEX "source_bus_id_idx" IS 'deleting a bus: the sources on it';
COMMENT ON INDEX "panel_bus_id_idx" IS 'deleting a bus: the panels on it';
COMMENT ON INDEX "circuit_panel_id_idx" IS 'deleting a panel: its circuits';
COMMENT ON INDEX "breaker_circuit_id_idx" IS 'deleting a circuit: its breakers';
COMMENT ON INDEX "run_circuit_id_idx" IS 'deleting a circuit: its runs';
COMMENT ON INDEX "run_from_bus_id_idx" IS 'deleting a bus: the runs that leave it';
COMMENT ON INDEX "run_to_bus_id_idx" IS 'deleting a bus: the runs that reach it';
COMMENT ON INDEX "transformer_from_bus_id_idx" IS 'deleting a bus: the transformers that it feeds';
COMMENT ON INDEX "transformer_to_bus_id_idx" IS 'deleting a bus: the transformers that feed it';
COMMENT ON INDEX "load_circuit_id_idx" IS 'deleting a circuit: its loads';
COMMENT ON INDEX "load_bus_id_idx" IS 'deleting a bus: the loads on it';
COMMENT ON INDEX "load_along_run_id_idx" IS 'deleting a run: the loads spread along it';
COMMENT ON INDEX "reading_bus_id_idx" IS 'deleting a bus: the readings at it';
COMMENT ON INDEX "revision_no_key" IS 'the revisions of a job by number; a number is given once';
COMMENT ON INDEX "delivery_revision_id_idx" IS 'the list of revisions: who got each';
COMMENT ON INDEX "delivery_sending_idx" IS 'deliveries_left_sending';
COMMENT ON INDEX "decision_revision_id_idx" IS 'the list of revisions: what was decided about each';
COMMENT ON INDEX "decision_delivery_id_idx" IS 'an inspector''s page: what came by this link';
