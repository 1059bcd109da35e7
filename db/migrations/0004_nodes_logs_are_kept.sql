CREATE TABLE "node_log" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"node_id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"heard_at" timestamp (3) with time zone NOT NULL,
	"level" text NOT NULL,
	"text" text NOT NULL,
	"fallback" jsonb,
	CONSTRAINT "node_log_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
ALTER TABLE "node_log" ADD CONSTRAINT "node_log_holding_id_node_id_node_holding_id_id_fk" FOREIGN KEY ("holding_id","node_id") REFERENCES "public"."node"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "node_log_at" ON "node_log" USING btree ("holding_id","house_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "node_log_once" ON "node_log" USING btree ("node_id","at","text") WHERE fallback is not null;--> statement-breakpoint
ALTER TABLE "node_log" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "node_log" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE POLICY "node_log_of_holding" ON "node_log" USING (current_setting('app.holding', true) = '*' OR holding_id::text = current_setting('app.holding', true));
