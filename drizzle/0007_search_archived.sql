-- Search finds archived records too where a list asks for them, and reads "B-48213" and "+44 20-1234" with
-- and without their punctuation: each word may occur as typed or stripped to letters and figures.
DROP FUNCTION search_shop(text, text[], integer);--> statement-breakpoint
DROP FUNCTION search_shop_nearly(text, text[], integer);--> statement-breakpoint

CREATE FUNCTION search_patterns(query text, OUT typed text[], OUT plain text[], OUT longest integer)
  LANGUAGE sql IMMUTABLE SET search_path = pg_catalog, public AS $$
  SELECT array_agg('%' || regexp_replace(w, '([\\%_])', '\\\1', 'g') || '%' ORDER BY n),
         array_agg('%' || coalesce(nullif(regexp_replace(w, '[^[:alnum:]]', '', 'g'), ''),
           regexp_replace(w, '([\\%_])', '\\\1', 'g')) || '%' ORDER BY n),
         (array_agg(n ORDER BY length(w) DESC, n))[1]::integer
    FROM regexp_split_to_table(btrim(lower(query)), '\s+') WITH ORDINALITY AS split(w, n)
   WHERE w <> ''
$$;--> statement-breakpoint

CREATE FUNCTION matches_all(words text, typed text[], plain text[]) RETURNS boolean
  LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
  SELECT NOT EXISTS (
    SELECT FROM unnest(typed, plain) AS pair(t, p) WHERE words NOT LIKE t AND words NOT LIKE p)
$$;--> statement-breakpoint

-- Definer functions, because LIKE is not leakproof: under row-level security the planner may not use the
-- trigram indexes for it. The shop comes from the same setting the policies use.
CREATE FUNCTION search_shop(query text, kinds text[], most integer, archived boolean DEFAULT false)
  RETURNS TABLE (kind text, id uuid, score real)
  LANGUAGE plpgsql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
DECLARE
  here uuid := nullif(current_setting('app.shop_id', true), '')::uuid;
  typed text[];
  plain text[];
  longest integer;
  rare text;
  rare_plain text;
BEGIN
  IF here IS NULL OR nullif(current_setting('app.customer_id', true), '') IS NOT NULL THEN
    RETURN;
  END IF;
  SELECT p.typed, p.plain, p.longest INTO typed, plain, longest FROM search_patterns(query) p;
  IF typed IS NULL THEN
    RETURN;
  END IF;
  -- The longest word goes to the index; the others are checked on what it finds.
  rare := typed[longest];
  rare_plain := plain[longest];
  RETURN QUERY
  WITH found AS (
    SELECT 'customer' AS kind, c.id, c.search_text FROM customer c
     WHERE 'customer' = ANY (kinds) AND c.shop_id = here AND (c.archived_at IS NOT NULL) = archived
       AND (c.search_text LIKE rare OR c.search_text LIKE rare_plain)
       AND matches_all(c.search_text, typed, plain)
    UNION ALL
    SELECT 'site', s.id, s.search_text || ' ' || c.search_text
      FROM (
        SELECT own.id FROM site own
         WHERE own.shop_id = here AND (own.search_text LIKE rare OR own.search_text LIKE rare_plain)
        UNION
        SELECT near.id FROM customer whose
          JOIN site near ON near.shop_id = here AND near.customer_id = whose.id
         WHERE whose.shop_id = here AND (whose.search_text LIKE rare OR whose.search_text LIKE rare_plain)
      ) candidate
      JOIN site s ON s.shop_id = here AND s.id = candidate.id
      JOIN customer c ON c.shop_id = here AND c.id = s.customer_id
     WHERE 'site' = ANY (kinds) AND (s.archived_at IS NOT NULL) = archived
       AND matches_all(s.search_text || ' ' || c.search_text, typed, plain)
    UNION ALL
    SELECT 'instrument', i.id, i.search_text || ' ' || s.search_text || ' ' || c.search_text
      FROM (
        SELECT own.id FROM instrument own
         WHERE own.shop_id = here AND (own.search_text LIKE rare OR own.search_text LIKE rare_plain)
        UNION
        SELECT h.instrument_id FROM site near
          JOIN instrument_holding h ON h.shop_id = here AND h.site_id = near.id AND h.until IS NULL
         WHERE near.shop_id = here AND (near.search_text LIKE rare OR near.search_text LIKE rare_plain)
        UNION
        SELECT h.instrument_id FROM customer whose
          JOIN instrument_holding h ON h.shop_id = here AND h.owner_id = whose.id AND h.until IS NULL
         WHERE whose.shop_id = here AND (whose.search_text LIKE rare OR whose.search_text LIKE rare_plain)
      ) candidate
      JOIN instrument i ON i.shop_id = here AND i.id = candidate.id
      JOIN instrument_holding h ON h.shop_id = here AND h.instrument_id = i.id AND h.until IS NULL
      JOIN site s ON s.shop_id = here AND s.id = h.site_id
      JOIN customer c ON c.shop_id = here AND c.id = h.owner_id
     WHERE 'instrument' = ANY (kinds) AND (i.archived_at IS NOT NULL) = archived
       AND matches_all(i.search_text || ' ' || s.search_text || ' ' || c.search_text, typed, plain)
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

REVOKE ALL ON FUNCTION search_patterns(text), matches_all(text, text[], text[]),
  search_shop(text, text[], integer, boolean), search_shop_nearly(text, text[], integer) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION matches_all(text, text[], text[]), search_patterns(text),
  search_shop(text, text[], integer, boolean), search_shop_nearly(text, text[], integer) TO agraffe_app;
