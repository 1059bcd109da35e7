-- Readings by month: dropping a month is then a moment's work, and its index stays small enough to be kept in memory.
CREATE TABLE "reading" (
	"point" bigint NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"value" double precision NOT NULL,
	"quality" smallint DEFAULT 0 NOT NULL,
	CONSTRAINT "reading_pkey" PRIMARY KEY ("point", "at")
) PARTITION BY RANGE ("at");
--> statement-breakpoint
CREATE TABLE "rollup" (
	"point" bigint NOT NULL,
	"step_s" integer NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"least" double precision NOT NULL,
	"mean" double precision NOT NULL,
	"greatest" double precision NOT NULL,
	"count" integer NOT NULL,
	CONSTRAINT "rollup_pkey" PRIMARY KEY ("point", "step_s", "at")
);
--> statement-breakpoint
-- The app's role owns no table, so it makes a month through this one function of the owner's.
CREATE FUNCTION make_reading_month(at timestamptz) RETURNS void
LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
DECLARE
	first date := date_trunc('month', at AT TIME ZONE 'UTC')::date;
	name text := format('reading_%s', to_char(first, 'YYYY_MM'));
BEGIN
	IF to_regclass(name) IS NOT NULL THEN RETURN; END IF;
	PERFORM pg_advisory_xact_lock(727278);
	IF to_regclass(name) IS NOT NULL THEN RETURN; END IF;
	EXECUTE format('CREATE TABLE %I PARTITION OF reading FOR VALUES FROM (%L) TO (%L)', name,
		to_char(first, 'YYYY-MM-DD') || ' 00:00:00+00', to_char(first + interval '1 month', 'YYYY-MM-DD') || ' 00:00:00+00');
END $$;
--> statement-breakpoint
-- Row security is the second line behind the permission table: a query that forgets its holding sees nothing.
-- The worker, sign-in and the look-up of keys and tokens run under '*'.
ALTER TABLE "api_key" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "api_key" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "api_key_of_holding" ON "api_key" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "audit_log" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "audit_log" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "audit_log_of_holding" ON "audit_log" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "idempotency" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "idempotency" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "idempotency_of_holding" ON "idempotency" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "house" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "house" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "house_of_holding" ON "house" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "node" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "node" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "node_of_holding" ON "node" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "point" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "point" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "point_of_holding" ON "point" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "calibration" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "calibration" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "calibration_of_holding" ON "calibration" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "source" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "source" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "source_of_holding" ON "source" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "channel" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "channel" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "channel_of_holding" ON "channel" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "loop" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "loop" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "loop_of_holding" ON "loop" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "interlock" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "interlock" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "interlock_of_holding" ON "interlock" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "lockout" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "lockout" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "lockout_of_holding" ON "lockout" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "rule" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "rule" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "rule_of_holding" ON "rule" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "rule_version" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "rule_version" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "rule_version_of_holding" ON "rule_version" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "switching" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "switching" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "switching_of_holding" ON "switching" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "decision" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "decision" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "decision_of_holding" ON "decision" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "relay_report" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "relay_report" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "relay_report_of_holding" ON "relay_report" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "person_command" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "person_command" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "person_command_of_holding" ON "person_command" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "control_memory" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "control_memory" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "control_memory_of_holding" ON "control_memory" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "alarm" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "alarm" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "alarm_of_holding" ON "alarm" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "alarm_event" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "alarm_event" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "alarm_event_of_holding" ON "alarm_event" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "heap_entry" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "heap_entry" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "heap_entry_of_holding" ON "heap_entry" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "night" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "night" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "night_of_holding" ON "night" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
-- The audit log is append-only for everybody who comes through the app.
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN RAISE EXCEPTION 'the audit log is append-only'; END $$;
--> statement-breakpoint
CREATE TRIGGER audit_log_append_only BEFORE UPDATE ON "audit_log" FOR EACH ROW EXECUTE FUNCTION refuse_change();
