-- Row security for test readings, as for every table of a holding.
ALTER TABLE "test_read" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "test_read" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "test_read_of_holding" ON "test_read" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
