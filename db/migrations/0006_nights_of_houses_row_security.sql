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
