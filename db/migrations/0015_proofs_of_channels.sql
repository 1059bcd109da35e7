CREATE TABLE "proof" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"channel_id" uuid NOT NULL,
	"begun_by" text NOT NULL,
	"begun_at" timestamp (3) with time zone NOT NULL,
	"ended_by" text,
	"ended_at" timestamp (3) with time zone,
	"outcome" text,
	"ended_why" text,
	"wiring" jsonb NOT NULL,
	"records" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"runs" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"revision" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "proof_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
ALTER TABLE "channel" ADD COLUMN "protection" jsonb;--> statement-breakpoint
ALTER TABLE "attachment" ADD COLUMN "proof_id" uuid;--> statement-breakpoint
ALTER TABLE "rule_version" ADD COLUMN "unproved" jsonb;--> statement-breakpoint
ALTER TABLE "proof" ADD CONSTRAINT "proof_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "proof_channel" ON "proof" USING btree ("holding_id","channel_id","begun_at");--> statement-breakpoint
CREATE UNIQUE INDEX "proof_open" ON "proof" USING btree ("channel_id") WHERE ended_at is null;--> statement-breakpoint
ALTER TABLE "attachment" ADD CONSTRAINT "attachment_holding_id_proof_id_proof_holding_id_id_fk" FOREIGN KEY ("holding_id","proof_id") REFERENCES "public"."proof"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "attachment_proof" ON "attachment" USING btree ("holding_id","proof_id");--> statement-breakpoint
ALTER TABLE "attachment" ADD CONSTRAINT "attachment_of_one" CHECK (num_nonnulls(entry_id, point_id, proof_id) = 1);--> statement-breakpoint
ALTER TABLE "proof" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "proof" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE POLICY "proof_of_holding" ON "proof" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
