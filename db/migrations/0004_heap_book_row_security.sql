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
