-- Search in two steps: what matches, and how well. A list needs the first alone, and needs all of it.
DROP FUNCTION search_shop(text, text[], integer, boolean);--> statement-breakpoint

CREATE FUNCTION search_matches(query text, kinds text[], archived boolean, most_each integer DEFAULT NULL)
  RETURNS TABLE (kind text, id uuid, words text)
  LANGUAGE plpgsql STABLE SECURITY DEFINER SET search_path = pg_catalog, public
  -- A plan made for no word in particular walks the tables where this word needs the index, and the reverse.
  SET plan_cache_mode = force_custom_plan AS $$
DECLARE
  here uuid := nullif(current_setting('app.shop_id', true), '')::uuid;
  typed text[];
  plain text[];
  longest integer;
  rare text;
  rare_plain text;
  -- Punctuation was typed: only then is the slower look at both spellings needed.
  two_ways boolean;
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
  two_ways := typed <> plain;
  IF 'customer' = ANY (kinds) THEN
    RETURN QUERY
    SELECT 'customer', c.id, c.search_text FROM customer c
     WHERE c.shop_id = here AND (c.archived_at IS NOT NULL) = archived
       AND (c.search_text LIKE rare OR c.search_text LIKE rare_plain)
       AND (c.search_text LIKE ALL (typed) OR (two_ways AND matches_all(c.search_text, typed, plain)))
     LIMIT most_each;
  END IF;
  IF 'site' = ANY (kinds) THEN
    RETURN QUERY
    SELECT 'site', s.id, w.words
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
     CROSS JOIN LATERAL (SELECT s.search_text || ' ' || c.search_text AS words) w
     WHERE (s.archived_at IS NOT NULL) = archived
       AND (w.words LIKE ALL (typed) OR (two_ways AND matches_all(w.words, typed, plain)))
     LIMIT most_each;
  END IF;
  IF 'instrument' = ANY (kinds) THEN
    RETURN QUERY
    SELECT 'instrument', i.id, w.words
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
     CROSS JOIN LATERAL (SELECT i.search_text || ' ' || s.search_text || ' ' || c.search_text AS words) w
     WHERE (i.archived_at IS NOT NULL) = archived
       AND (w.words LIKE ALL (typed) OR (two_ways AND matches_all(w.words, typed, plain)))
     LIMIT most_each;
  END IF;
END $$;--> statement-breakpoint

-- The best first. Where very many match, the first thousand of a kind are weighed against each other.
CREATE FUNCTION search_shop(query text, kinds text[], most integer)
  RETURNS TABLE (kind text, id uuid, score real)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
  SELECT m.kind, m.id, word_similarity(lower(query), m.words)
    FROM search_matches(query, kinds, false, 1000) m
   ORDER BY 3 DESC, 1, 2 LIMIT most
$$;--> statement-breakpoint

REVOKE ALL ON FUNCTION search_matches(text, text[], boolean, integer), search_shop(text, text[], integer) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION search_matches(text, text[], boolean, integer), search_shop(text, text[], integer) TO agraffe_app;
