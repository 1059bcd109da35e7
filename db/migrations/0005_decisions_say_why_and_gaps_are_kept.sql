CREATE TABLE "control_gap" (
	"from" timestamp (3) with time zone PRIMARY KEY NOT NULL,
	"to" timestamp (3) with time zone NOT NULL
);
--> statement-breakpoint
ALTER TABLE "decision" ADD COLUMN "explanation" jsonb;