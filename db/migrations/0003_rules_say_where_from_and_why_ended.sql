ALTER TABLE "rule" ADD COLUMN "copied_from" jsonb;--> statement-breakpoint
ALTER TABLE "rule_version" ADD COLUMN "ended_by" text;--> statement-breakpoint
ALTER TABLE "rule_version" ADD COLUMN "ended_why" text;