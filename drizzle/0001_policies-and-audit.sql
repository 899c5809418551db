-- Row policies, the audit chain, immutable papers and the mirrors of the sign-in tables.
-- Roles are made by db/migrate.ts before this runs; the owner of the tables runs the migrations.

CREATE EXTENSION IF NOT EXISTS pg_trgm;
--> statement-breakpoint
CREATE EXTENSION IF NOT EXISTS btree_gin;
--> statement-breakpoint
-- the find field: number, name, plate, VIN and code in one text
CREATE INDEX cases_search ON cases USING gin (shop_id, search_text gin_trgm_ops);
--> statement-breakpoint

-- The shop of the running transaction; absent means no rows, never all rows.
CREATE FUNCTION current_shop() RETURNS text LANGUAGE sql STABLE PARALLEL SAFE
AS $$ SELECT nullif(current_setting('app.shop_id', true), '') $$;
--> statement-breakpoint

DO $$
DECLARE t text;
BEGIN
  FOREACH t IN ARRAY ARRAY['shops','people','counters','idempotency','customers','vehicles','cases','stage_events','authorizations',
    'samples','case_codes','test_outcomes','cause_marks','case_notes','files','quote_drafts','quote_jobs','quote_revisions','customer_links',
    'approvals','questions','work_jobs','clock_entries','parts_used','papers','payments','mails','labour_rates','operations','parts','set_jobs',
    'audit','audit_heads']
  LOOP
    EXECUTE format('ALTER TABLE %I ENABLE ROW LEVEL SECURITY', t);
    EXECUTE format('CREATE POLICY of_shop ON %I USING (shop_id = current_shop()) WITH CHECK (shop_id = current_shop())', t);
    EXECUTE format('GRANT SELECT ON %I TO firedeck_app', t);
  END LOOP;
  FOREACH t IN ARRAY ARRAY['shops','counters','idempotency','customers','vehicles','cases','samples','case_codes','test_outcomes','cause_marks',
    'files','quote_drafts','quote_jobs','customer_links','work_jobs','clock_entries','parts_used','mails','labour_rates','operations','parts','set_jobs']
  LOOP
    EXECUTE format('GRANT INSERT, UPDATE ON %I TO firedeck_app', t);
  END LOOP;
  -- written once, never changed
  FOREACH t IN ARRAY ARRAY['stage_events','authorizations','case_notes','quote_revisions','approvals','questions','papers','payments']
  LOOP
    EXECUTE format('GRANT INSERT ON %I TO firedeck_app', t);
  END LOOP;
  FOREACH t IN ARRAY ARRAY['samples','case_codes','quote_jobs','parts_used']
  LOOP
    EXECUTE format('GRANT DELETE ON %I TO firedeck_app', t);
  END LOOP;
END $$;
--> statement-breakpoint
GRANT UPDATE (first_opened_at, withdrawn_at, superseded_at) ON quote_revisions TO firedeck_app;
--> statement-breakpoint

-- Papers and sent revisions stay as issued even for the owner of the tables.
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'rows of % are never changed', TG_TABLE_NAME USING ERRCODE = 'integrity_constraint_violation';
END $$;
--> statement-breakpoint
CREATE TRIGGER papers_immutable BEFORE UPDATE OR DELETE ON papers FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER approvals_immutable BEFORE UPDATE OR DELETE ON approvals FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE FUNCTION refuse_revision_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'DELETE' OR (NEW.shop_id, NEW.id, NEW.case_id, NEW.number, NEW.snapshot, NEW.sha256, NEW.currency, NEW.total_minor, NEW.sent_at, NEW.expires_at)
     IS DISTINCT FROM (OLD.shop_id, OLD.id, OLD.case_id, OLD.number, OLD.snapshot, OLD.sha256, OLD.currency, OLD.total_minor, OLD.sent_at, OLD.expires_at) THEN
    RAISE EXCEPTION 'a sent revision is never changed' USING ERRCODE = 'integrity_constraint_violation';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER revisions_immutable BEFORE UPDATE OR DELETE ON quote_revisions FOR EACH ROW EXECUTE FUNCTION refuse_revision_change();
--> statement-breakpoint

-- The approved price of a job is what the customer said yes to: no statement changes it afterwards.
CREATE FUNCTION refuse_approved_price_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF (NEW.approved_minor, NEW.lines, NEW.revision_id, NEW.quote_job_id) IS DISTINCT FROM (OLD.approved_minor, OLD.lines, OLD.revision_id, OLD.quote_job_id) THEN
    RAISE EXCEPTION 'an approved job keeps its price' USING ERRCODE = 'integrity_constraint_violation';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER work_jobs_price BEFORE UPDATE ON work_jobs FOR EACH ROW EXECUTE FUNCTION refuse_approved_price_change();
--> statement-breakpoint

-- What an audit hash covers. jsonb prints in one canonical form, so the digest can be made again from the stored row.
CREATE FUNCTION audit_digest(a audit) RETURNS text LANGUAGE sql IMMUTABLE AS $$
  SELECT encode(sha256(convert_to(jsonb_build_array(a.previous_hash, a.shop_id, a.seq, to_char(a.at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US'),
    a.actor_id, a.actor_name, a.role, a.request_id, a.verb, a.reason, a.entity, a.entity_id, a.case_id, a.action, a.before, a.after)::text, 'UTF8')), 'hex')
$$;
--> statement-breakpoint
CREATE FUNCTION write_audit() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
DECLARE
  was jsonb := CASE WHEN TG_OP = 'INSERT' THEN NULL ELSE to_jsonb(OLD) END;
  now_is jsonb := CASE WHEN TG_OP = 'DELETE' THEN NULL ELSE to_jsonb(NEW) END;
  whole jsonb := coalesce(now_is, was);
  hidden text[] := coalesce(TG_ARGV, ARRAY[]::text[]);
  head audit_heads;
  entry audit;
  h text;
BEGIN
  IF was = now_is THEN RETURN NULL; END IF;
  FOREACH h IN ARRAY hidden LOOP
    was := was - h;
    now_is := now_is - h;
  END LOOP;
  INSERT INTO audit_heads (shop_id, seq, hash) VALUES (whole->>'shop_id', 0, '') ON CONFLICT DO NOTHING;
  SELECT * INTO head FROM audit_heads WHERE shop_id = whole->>'shop_id' FOR UPDATE;
  entry.shop_id := whole->>'shop_id';
  entry.seq := head.seq + 1;
  entry.at := clock_timestamp();
  entry.actor_id := coalesce(nullif(current_setting('app.actor_id', true), ''), 'system');
  entry.actor_name := coalesce(nullif(current_setting('app.actor_name', true), ''), 'Firedeck');
  entry.role := coalesce(nullif(current_setting('app.role', true), ''), 'system');
  entry.request_id := coalesce(nullif(current_setting('app.request_id', true), ''), '-');
  entry.verb := coalesce(nullif(current_setting('app.verb', true), ''), lower(TG_OP));
  entry.reason := nullif(current_setting('app.reason', true), '');
  entry.entity := TG_TABLE_NAME;
  entry.entity_id := coalesce(whole->>'id', whole->>'case_id', whole->>'shop_id');
  entry.case_id := CASE WHEN TG_TABLE_NAME = 'cases' THEN whole->>'id' ELSE whole->>'case_id' END;
  entry.action := lower(TG_OP);
  entry.before := was;
  entry.after := now_is;
  entry.previous_hash := head.hash;
  entry.hash := audit_digest(entry);
  INSERT INTO audit SELECT entry.*;
  UPDATE audit_heads SET seq = entry.seq, hash = entry.hash WHERE shop_id = entry.shop_id;
  PERFORM pg_notify('firedeck_changes', json_build_object('shop', entry.shop_id, 'case', entry.case_id, 'entity', entry.entity)::text);
  RETURN NULL;
END $$;
--> statement-breakpoint
DO $$
DECLARE t text;
BEGIN
  FOREACH t IN ARRAY ARRAY['shops','people','customers','vehicles','cases','stage_events','authorizations',
    'samples','case_codes','test_outcomes','cause_marks','case_notes','files','quote_drafts','quote_jobs',
    'approvals','questions','work_jobs','clock_entries','parts_used','payments','labour_rates','operations','parts','set_jobs']
  LOOP
    EXECUTE format('CREATE TRIGGER audited AFTER INSERT OR UPDATE OR DELETE ON %I FOR EACH ROW EXECUTE FUNCTION write_audit()', t);
  END LOOP;
END $$;
--> statement-breakpoint
CREATE TRIGGER audited AFTER INSERT OR UPDATE OR DELETE ON papers FOR EACH ROW EXECUTE FUNCTION write_audit('bytes', 'snapshot');
--> statement-breakpoint
CREATE TRIGGER audited AFTER INSERT OR UPDATE OR DELETE ON quote_revisions FOR EACH ROW EXECUTE FUNCTION write_audit('snapshot');
--> statement-breakpoint
CREATE TRIGGER audited AFTER INSERT OR UPDATE OR DELETE ON customer_links FOR EACH ROW EXECUTE FUNCTION write_audit('secret_hash');
--> statement-breakpoint
CREATE TRIGGER audited AFTER INSERT OR UPDATE OR DELETE ON mails FOR EACH ROW EXECUTE FUNCTION write_audit('text', 'html');
--> statement-breakpoint

-- The first entry of the current shop whose hash, link or number does not fit; no row when the chain holds.
CREATE FUNCTION verify_audit() RETURNS TABLE (seq bigint, fault text) LANGUAGE sql STABLE AS $$
  WITH chain AS (
    SELECT a.seq, audit_digest(a) = a.hash AS sound, a.previous_hash = lag(a.hash, 1, '') OVER (ORDER BY a.seq) AS linked,
           a.seq = row_number() OVER (ORDER BY a.seq) AS in_order
    FROM audit a WHERE a.shop_id = current_shop()
  ), faults AS (
    SELECT c.seq, CASE WHEN NOT c.sound THEN 'changed after it was written' WHEN NOT c.in_order THEN 'an entry before it is missing' ELSE 'does not follow the entry before it' END AS fault
    FROM chain c WHERE NOT (c.sound AND c.linked AND c.in_order)
    UNION ALL
    SELECT h.seq, 'the newest entries are missing' FROM audit_heads h
    WHERE h.shop_id = current_shop() AND h.seq IS DISTINCT FROM coalesce((SELECT max(c.seq) FROM chain c), 0)
  )
  SELECT f.seq, f.fault FROM faults f ORDER BY f.seq LIMIT 1
$$;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION verify_audit() TO firedeck_app;
--> statement-breakpoint

-- A secret from a customer's address finds its shop here, before any shop is known; kept out of the shops' tables.
CREATE SCHEMA routing;
--> statement-breakpoint
CREATE TABLE routing.link_routes (secret_hash text PRIMARY KEY, shop_id text NOT NULL, link_id text NOT NULL);
--> statement-breakpoint
CREATE FUNCTION route_link() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  INSERT INTO routing.link_routes VALUES (NEW.secret_hash, NEW.shop_id, NEW.id);
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE TRIGGER routed AFTER INSERT ON customer_links FOR EACH ROW EXECUTE FUNCTION route_link();
--> statement-breakpoint
CREATE FUNCTION find_link(hash text) RETURNS TABLE (shop_id text, link_id text) LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp
AS $$ SELECT r.shop_id, r.link_id FROM routing.link_routes r WHERE r.secret_hash = hash $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION find_link(text) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION find_link(text) TO firedeck_app;
--> statement-breakpoint

-- A job row is put in the queue by the transaction that needs it done.
CREATE FUNCTION enqueue(task text, payload json, key text DEFAULT NULL, due timestamptz DEFAULT NULL) RETURNS void
LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  PERFORM graphile_worker.add_job(task, payload, job_key => key, run_at => due, max_attempts => 20);
END $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION enqueue(text, json, text, timestamptz) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION enqueue(text, json, text, timestamptz) TO firedeck_app;
--> statement-breakpoint

-- Sign-in tables: only their own role reaches them.
GRANT USAGE ON SCHEMA auth TO firedeck_auth;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA auth TO firedeck_auth;
--> statement-breakpoint
ALTER TABLE auth.member ADD CONSTRAINT member_role CHECK (role IN ('owner', 'writer', 'technician'));
--> statement-breakpoint
ALTER TABLE auth.invitation ADD CONSTRAINT invitation_role CHECK (role IN ('owner', 'writer', 'technician'));
--> statement-breakpoint
CREATE FUNCTION keep_an_owner() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF OLD.role = 'owner' AND (TG_OP = 'DELETE' OR NEW.role <> 'owner')
     AND EXISTS (SELECT 1 FROM auth.organization o WHERE o.id = OLD.organization_id)
     AND NOT EXISTS (SELECT 1 FROM auth.member m WHERE m.organization_id = OLD.organization_id AND m.role = 'owner' AND m.id <> OLD.id) THEN
    RAISE EXCEPTION 'a shop keeps at least one owner' USING ERRCODE = 'check_violation';
  END IF;
  RETURN CASE WHEN TG_OP = 'DELETE' THEN OLD ELSE NEW END;
END $$;
--> statement-breakpoint
CREATE TRIGGER last_owner BEFORE UPDATE OR DELETE ON auth.member FOR EACH ROW EXECUTE FUNCTION keep_an_owner();
--> statement-breakpoint
CREATE FUNCTION mirror_organization() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  INSERT INTO shops (shop_id, name, settings) VALUES (NEW.id, NEW.name, '{}') ON CONFLICT DO NOTHING;
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE TRIGGER mirrored AFTER INSERT ON auth.organization FOR EACH ROW EXECUTE FUNCTION mirror_organization();
--> statement-breakpoint
CREATE FUNCTION mirror_member() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  IF TG_OP = 'DELETE' THEN
    UPDATE people SET is_active = false WHERE shop_id = OLD.organization_id AND id = OLD.user_id;
  ELSE
    INSERT INTO people (shop_id, id, name, email, role, is_active)
    SELECT NEW.organization_id, u.id, u.name, u.email, NEW.role, true FROM auth."user" u WHERE u.id = NEW.user_id
    ON CONFLICT (shop_id, id) DO UPDATE SET name = excluded.name, email = excluded.email, role = excluded.role, is_active = true;
  END IF;
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE TRIGGER mirrored AFTER INSERT OR UPDATE OR DELETE ON auth.member FOR EACH ROW EXECUTE FUNCTION mirror_member();
--> statement-breakpoint
CREATE FUNCTION mirror_user() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  UPDATE people SET name = NEW.name, email = NEW.email WHERE id = NEW.id AND (name, email) IS DISTINCT FROM (NEW.name, NEW.email);
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE TRIGGER mirrored AFTER UPDATE ON auth."user" FOR EACH ROW EXECUTE FUNCTION mirror_user();
