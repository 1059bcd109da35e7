CREATE TABLE "heap_cost" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"source_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"paid_on" date NOT NULL,
	"text" text NOT NULL,
	"micros" bigint NOT NULL,
	"work" jsonb,
	"years" integer NOT NULL,
	"by" text NOT NULL,
	"entered_at" timestamp (3) with time zone NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "heap_cost_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "money_book" (
	"holding_id" uuid NOT NULL,
	"body" jsonb NOT NULL,
	"revision" integer DEFAULT 1 NOT NULL,
	"by" text NOT NULL,
	"entered_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "money_book_holding_id_pk" PRIMARY KEY("holding_id")
);
--> statement-breakpoint
CREATE TABLE "report_schedule" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"span" text NOT NULL,
	"sections" jsonb NOT NULL,
	"to" jsonb NOT NULL,
	"by" text NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "report_schedule_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "report_sent" (
	"holding_id" uuid NOT NULL,
	"schedule_id" uuid NOT NULL,
	"from_night" date NOT NULL,
	"to_night" date NOT NULL,
	"to" text NOT NULL,
	"claimed_at" timestamp (3) with time zone NOT NULL,
	"sent_at" timestamp (3) with time zone,
	CONSTRAINT "report_sent_holding_id_schedule_id_from_night_to_pk" PRIMARY KEY("holding_id","schedule_id","from_night","to")
);
--> statement-breakpoint
ALTER TABLE "heap_cost" ADD CONSTRAINT "heap_cost_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "money_book" ADD CONSTRAINT "money_book_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_schedule" ADD CONSTRAINT "report_schedule_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_sent" ADD CONSTRAINT "report_sent_holding_id_schedule_id_report_schedule_holding_id_id_fk" FOREIGN KEY ("holding_id","schedule_id") REFERENCES "public"."report_schedule"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "heap_cost_source" ON "heap_cost" USING btree ("holding_id","source_id","paid_on");