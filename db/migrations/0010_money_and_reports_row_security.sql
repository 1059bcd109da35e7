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
