-- A sign-in that succeeds ends the count of those that failed before it.
CREATE FUNCTION forget_requests(limit_key text) RETURNS void
  LANGUAGE sql VOLATILE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
  DELETE FROM request_count WHERE key = limit_key
$$;--> statement-breakpoint
REVOKE ALL ON FUNCTION forget_requests(text) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION forget_requests(text) TO agraffe_app;
