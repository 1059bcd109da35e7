CREATE TABLE "archive" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"way" text NOT NULL,
	"state" text NOT NULL,
	"name" text NOT NULL,
	"bytes" bigint DEFAULT 0 NOT NULL,
	"received" bigint DEFAULT 0 NOT NULL,
	"done" bigint DEFAULT 0 NOT NULL,
	"total" bigint DEFAULT 0 NOT NULL,
	"found" jsonb,
	"into_id" uuid,
	"into_name" text,
	"problem" text,
	"by" text NOT NULL,
	"user_id" uuid,
	"created_at" timestamp (3) with time zone NOT NULL,
	"ended_at" timestamp (3) with time zone,
	CONSTRAINT "archive_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
ALTER TABLE "house" ADD COLUMN "laid_up_at" timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "archive" ADD CONSTRAINT "archive_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "archive_created" ON "archive" USING btree ("holding_id","created_at");