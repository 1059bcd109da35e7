CREATE TABLE "test_read" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"node_id" uuid NOT NULL,
	"ask" jsonb NOT NULL,
	"asked_at" timestamp (3) with time zone NOT NULL,
	"answer" jsonb,
	CONSTRAINT "test_read_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
ALTER TABLE "node" ADD COLUMN "modbus" jsonb;--> statement-breakpoint
ALTER TABLE "node" ADD COLUMN "mqtt" jsonb;--> statement-breakpoint
ALTER TABLE "node" ADD COLUMN "bus_secret" text;--> statement-breakpoint
ALTER TABLE "node" ADD COLUMN "registers" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "test_read" ADD CONSTRAINT "test_read_holding_id_node_id_node_holding_id_id_fk" FOREIGN KEY ("holding_id","node_id") REFERENCES "public"."node"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "test_read_asked" ON "test_read" USING btree ("asked_at");