-- What must never be, and the few functions that work before a shop is known.

-- An instrument stands in one place at a time.
ALTER TABLE instrument_holding ADD CONSTRAINT instrument_holding_overlap
  EXCLUDE USING gist (
    shop_id WITH =, instrument_id WITH =,
    daterange(since, coalesce(until, 'infinity'::date), '[)') WITH &&
  );--> statement-breakpoint

-- Two live visits of one technician never overlap.
ALTER TABLE visit_technician ADD CONSTRAINT visit_overlap
  EXCLUDE USING gist (shop_id WITH =, member_id WITH =, during WITH &&) WHERE (live);--> statement-breakpoint

CREATE FUNCTION visit_is_live(state visit_state) RETURNS boolean LANGUAGE sql IMMUTABLE AS $$
  SELECT state NOT IN ('declined', 'moved', 'cancelled', 'missed')
$$;--> statement-breakpoint

-- The wall time in the site's zone is the truth; the range in UTC is derived from it.
CREATE FUNCTION visit_derive_during() RETURNS trigger LANGUAGE plpgsql SET search_path = pg_catalog, public AS $$
BEGIN
  NEW.during := tstzrange(
    NEW.starts_local AT TIME ZONE NEW.time_zone,
    NEW.ends_local AT TIME ZONE NEW.time_zone, '[)');
  IF isempty(NEW.during) THEN
    RAISE EXCEPTION 'The visit has no length in its time zone' USING ERRCODE = 'check_violation',
      CONSTRAINT = 'visit_has_length';
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER visit_derive_during BEFORE INSERT OR UPDATE ON visit
  FOR EACH ROW EXECUTE FUNCTION visit_derive_during();--> statement-breakpoint

CREATE FUNCTION visit_tell_technicians() RETURNS trigger LANGUAGE plpgsql SET search_path = pg_catalog, public AS $$
BEGIN
  UPDATE visit_technician t SET during = NEW.during, live = visit_is_live(NEW.state)
   WHERE t.shop_id = NEW.shop_id AND t.visit_id = NEW.id
     AND (t.during, t.live) IS DISTINCT FROM (NEW.during, visit_is_live(NEW.state));
  RETURN NULL;
END $$;--> statement-breakpoint
CREATE TRIGGER visit_tell_technicians AFTER UPDATE ON visit
  FOR EACH ROW EXECUTE FUNCTION visit_tell_technicians();--> statement-breakpoint

-- Whatever a writer says, a technician's row carries its visit's time and state.
CREATE FUNCTION visit_technician_follow() RETURNS trigger LANGUAGE plpgsql SET search_path = pg_catalog, public AS $$
BEGIN
  SELECT v.during, visit_is_live(v.state) INTO NEW.during, NEW.live
    FROM visit v WHERE v.shop_id = NEW.shop_id AND v.id = NEW.visit_id;
  IF NOT FOUND THEN
    RAISE EXCEPTION 'No such visit' USING ERRCODE = 'foreign_key_violation';
  END IF;
  RETURN NEW;
END $$;--> statement-breakpoint
CREATE TRIGGER visit_technician_follow BEFORE INSERT OR UPDATE ON visit_technician
  FOR EACH ROW EXECUTE FUNCTION visit_technician_follow();--> statement-breakpoint

-- A shop always has an owner. Checked at commit, so that one owner can hand over to another.
CREATE FUNCTION shop_keeps_an_owner() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER
  SET search_path = pg_catalog, public AS $$
BEGIN
  PERFORM 1 FROM shop WHERE id = OLD.shop_id FOR UPDATE;
  IF FOUND AND NOT EXISTS (
    SELECT 1 FROM member WHERE shop_id = OLD.shop_id AND role = 'owner' AND ended_at IS NULL
  ) THEN
    RAISE EXCEPTION 'The last owner cannot be removed' USING ERRCODE = 'check_violation',
      CONSTRAINT = 'shop_keeps_an_owner';
  END IF;
  RETURN NULL;
END $$;--> statement-breakpoint
CREATE CONSTRAINT TRIGGER shop_keeps_an_owner AFTER UPDATE OR DELETE ON member
  DEFERRABLE INITIALLY DEFERRED FOR EACH ROW
  WHEN (OLD.role = 'owner' AND OLD.ended_at IS NULL)
  EXECUTE FUNCTION shop_keeps_an_owner();--> statement-breakpoint

-- Before a shop is known: whose sign-in is this, and which shop does a mailed link belong to.
CREATE FUNCTION memberships_of(person uuid)
  RETURNS TABLE (shop_id uuid, member_id uuid, role role, customer_id uuid, member_name text, shop_name text)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
  SELECT m.shop_id, m.id, m.role, m.customer_id, m.name, s.name
    FROM member m JOIN shop s ON s.id = m.shop_id
   WHERE m.person_id = person AND m.ended_at IS NULL
   ORDER BY m.created_at, m.shop_id
$$;--> statement-breakpoint

CREATE FUNCTION shop_of_invitation(hash text) RETURNS uuid
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
  SELECT shop_id FROM invitation WHERE token_hash = hash
$$;--> statement-breakpoint

-- One window of the rate limit, shared by all web processes.
CREATE FUNCTION count_request(limit_key text, window_seconds integer)
  RETURNS TABLE (seen integer, resets_in integer)
  LANGUAGE plpgsql VOLATILE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
BEGIN
  IF random() < 0.01 THEN
    DELETE FROM request_count WHERE window_ends < clock_timestamp();
  END IF;
  RETURN QUERY
  INSERT INTO request_count AS r (key, window_ends, count)
  VALUES (limit_key, clock_timestamp() + make_interval(secs => window_seconds), 1)
  ON CONFLICT (key) DO UPDATE SET
    count = CASE WHEN r.window_ends < clock_timestamp() THEN 1 ELSE r.count + 1 END,
    window_ends = CASE WHEN r.window_ends < clock_timestamp()
      THEN clock_timestamp() + make_interval(secs => window_seconds) ELSE r.window_ends END
  RETURNING r.count, ceil(extract(epoch FROM r.window_ends - clock_timestamp()))::integer;
END $$;--> statement-breakpoint

-- Search over one shop. A definer function, because ILIKE is not leakproof: under row-level security the
-- planner may not use the trigram indexes for it. The shop comes from the same setting the policies use.
CREATE FUNCTION search_shop(query text, kinds text[], most integer)
  RETURNS TABLE (kind text, id uuid, score real)
  LANGUAGE plpgsql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
DECLARE
  here uuid := nullif(current_setting('app.shop_id', true), '')::uuid;
  words text[];
  patterns text[];
  longest text;
BEGIN
  IF here IS NULL OR nullif(current_setting('app.customer_id', true), '') IS NOT NULL THEN
    RETURN;
  END IF;
  words := regexp_split_to_array(btrim(lower(query)), '\s+');
  IF words IS NULL OR words = ARRAY[''] THEN
    RETURN;
  END IF;
  SELECT array_agg('%' || regexp_replace(w, '([\\%_])', '\\\1', 'g') || '%'),
         (array_agg('%' || regexp_replace(w, '([\\%_])', '\\\1', 'g') || '%' ORDER BY length(w) DESC))[1]
    INTO patterns, longest FROM unnest(words) AS w;
  RETURN QUERY
  WITH found AS (
    SELECT 'customer' AS kind, c.id, c.search_text FROM customer c
     WHERE 'customer' = ANY (kinds) AND c.shop_id = here AND c.archived_at IS NULL
       AND c.search_text ILIKE longest AND c.search_text ILIKE ALL (patterns)
    UNION ALL
    SELECT 'site', s.id, s.search_text FROM site s
     WHERE 'site' = ANY (kinds) AND s.shop_id = here AND s.archived_at IS NULL
       AND s.search_text ILIKE longest AND s.search_text ILIKE ALL (patterns)
    UNION ALL
    SELECT 'instrument', i.id, i.search_text || ' ' || s.search_text || ' ' || c.search_text
      FROM (
        SELECT own.id FROM instrument own WHERE own.shop_id = here AND own.search_text ILIKE longest
        UNION
        SELECT h.instrument_id FROM site near
          JOIN instrument_holding h ON h.shop_id = here AND h.site_id = near.id AND h.until IS NULL
         WHERE near.shop_id = here AND near.search_text ILIKE longest
        UNION
        SELECT h.instrument_id FROM customer whose
          JOIN instrument_holding h ON h.shop_id = here AND h.owner_id = whose.id AND h.until IS NULL
         WHERE whose.shop_id = here AND whose.search_text ILIKE longest
      ) candidate
      JOIN instrument i ON i.shop_id = here AND i.id = candidate.id
      JOIN instrument_holding h ON h.shop_id = here AND h.instrument_id = i.id AND h.until IS NULL
      JOIN site s ON s.shop_id = here AND s.id = h.site_id
      JOIN customer c ON c.shop_id = here AND c.id = h.owner_id
     WHERE 'instrument' = ANY (kinds) AND i.archived_at IS NULL
       AND (i.search_text || ' ' || s.search_text || ' ' || c.search_text) ILIKE ALL (patterns)
  )
  SELECT f.kind, f.id, word_similarity(lower(query), f.search_text) FROM found f
   ORDER BY 3 DESC, 1, 2 LIMIT most;
END $$;--> statement-breakpoint

-- The same over misspelt words: asked only where search_shop finds nothing.
CREATE FUNCTION search_shop_nearly(query text, kinds text[], most integer)
  RETURNS TABLE (kind text, id uuid, score real)
  LANGUAGE plpgsql STABLE SECURITY DEFINER SET search_path = pg_catalog, public
  SET pg_trgm.word_similarity_threshold = 0.45 AS $$
DECLARE
  here uuid := nullif(current_setting('app.shop_id', true), '')::uuid;
BEGIN
  IF here IS NULL OR nullif(current_setting('app.customer_id', true), '') IS NOT NULL OR length(query) < 3 THEN
    RETURN;
  END IF;
  RETURN QUERY
  WITH found AS (
    SELECT 'customer' AS kind, c.id, c.search_text FROM customer c
     WHERE 'customer' = ANY (kinds) AND c.shop_id = here AND c.archived_at IS NULL AND lower(query) <% c.search_text
    UNION ALL
    SELECT 'site', s.id, s.search_text FROM site s
     WHERE 'site' = ANY (kinds) AND s.shop_id = here AND s.archived_at IS NULL AND lower(query) <% s.search_text
    UNION ALL
    SELECT 'instrument', i.id, i.search_text FROM instrument i
     WHERE 'instrument' = ANY (kinds) AND i.shop_id = here AND i.archived_at IS NULL AND lower(query) <% i.search_text
  )
  SELECT f.kind, f.id, word_similarity(lower(query), f.search_text) FROM found f
   ORDER BY 3 DESC, 1, 2 LIMIT most;
END $$;--> statement-breakpoint

REVOKE ALL ON FUNCTION memberships_of(uuid), shop_of_invitation(text), count_request(text, integer),
  search_shop(text, text[], integer), search_shop_nearly(text, text[], integer), shop_keeps_an_owner() FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION memberships_of(uuid), shop_of_invitation(text), count_request(text, integer),
  search_shop(text, text[], integer), search_shop_nearly(text, text[], integer) TO agraffe_app;
