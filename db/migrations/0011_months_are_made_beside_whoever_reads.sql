-- An archive reads or writes readings in one long transaction. CREATE TABLE ... PARTITION OF would wait for its end, and hold
-- up every reading behind itself meanwhile; ATTACH takes a lock that neither of them minds.
CREATE OR REPLACE FUNCTION make_reading_month(at timestamptz) RETURNS void
LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
DECLARE
	first date := date_trunc('month', at AT TIME ZONE 'UTC')::date;
	name text := format('reading_%s', to_char(first, 'YYYY_MM'));
BEGIN
	IF to_regclass(name) IS NOT NULL THEN RETURN; END IF;
	PERFORM pg_advisory_xact_lock(727278);
	IF to_regclass(name) IS NOT NULL THEN RETURN; END IF;
	EXECUTE format('CREATE TABLE %I (LIKE reading INCLUDING ALL)', name);
	EXECUTE format('ALTER TABLE reading ATTACH PARTITION %I FOR VALUES FROM (%L) TO (%L)', name,
		to_char(first, 'YYYY-MM-DD') || ' 00:00:00+00', to_char(first + interval '1 month', 'YYYY-MM-DD') || ' 00:00:00+00');
END $$;
