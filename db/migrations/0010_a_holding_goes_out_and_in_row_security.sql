-- Row security for archives, as for every table of a holding.
ALTER TABLE "archive" ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE "archive" FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY "archive_of_holding" ON "archive" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
