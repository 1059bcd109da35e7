-- Row security for the heap book's new tables, as for every table of a holding.
ALTER TABLE "heap_material" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "heap_material" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "heap_material_of_holding" ON "heap_material" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "attachment" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "attachment" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "attachment_of_holding" ON "attachment" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "probe_set" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "probe_set" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "probe_set_of_holding" ON "probe_set" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "heap_job" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "heap_job" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "heap_job_of_holding" ON "heap_job" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "finding_dismissal" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "finding_dismissal" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "finding_dismissal_of_holding" ON "finding_dismissal" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "calendar_link" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "calendar_link" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "calendar_link_of_holding" ON "calendar_link" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
-- Row security for the nights of houses, as for every table of a holding.
ALTER TABLE "house_night" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "house_night" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "house_night_of_holding" ON "house_night" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
-- Hours of points into which readings came late. Like reading and rollup it is keyed by the point's number alone.
CREATE TABLE "reading_due" (
	"point" bigint NOT NULL,
	"hour" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "reading_due_pkey" PRIMARY KEY ("point", "hour")
);

--> statement-breakpoint
-- Row security for imports, as for every table of a holding.
ALTER TABLE "import_batch" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "import_batch" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "import_batch_of_holding" ON "import_batch" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "import_part" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "import_part" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "import_part_of_holding" ON "import_part" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));

--> statement-breakpoint
-- Row security for money and reports, as for every table of a holding.
ALTER TABLE "money_book" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "money_book" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "money_book_of_holding" ON "money_book" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "heap_cost" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "heap_cost" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "heap_cost_of_holding" ON "heap_cost" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "report_schedule" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "report_schedule" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "report_schedule_of_holding" ON "report_schedule" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
--> statement-breakpoint
ALTER TABLE "report_sent" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "report_sent" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "report_sent_of_holding" ON "report_sent" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
