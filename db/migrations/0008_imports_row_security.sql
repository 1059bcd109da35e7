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
