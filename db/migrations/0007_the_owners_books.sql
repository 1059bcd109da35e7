CREATE TABLE "attachment" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"entry_id" uuid NOT NULL,
	"by" text NOT NULL,
	"entered_at" timestamp (3) with time zone NOT NULL,
	"width_px" integer NOT NULL,
	"height_px" integer NOT NULL,
	"image" "bytea" NOT NULL,
	"thumbnail" "bytea" NOT NULL,
	CONSTRAINT "attachment_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "calendar_link" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"hash" text NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	"last_used_at" timestamp (3) with time zone,
	"revoked_at" timestamp (3) with time zone,
	CONSTRAINT "calendar_link_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "finding_dismissal" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"source_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"mark" text NOT NULL,
	"level" double precision NOT NULL,
	"why" text NOT NULL,
	"by" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"taken_back_at" timestamp (3) with time zone,
	CONSTRAINT "finding_dismissal_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "heap_job" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"source_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"title" text NOT NULL,
	"due_on" date NOT NULL,
	"checklist" jsonb NOT NULL,
	"done_at" timestamp (3) with time zone,
	"done_by" text,
	"by" text NOT NULL,
	"entered_at" timestamp (3) with time zone NOT NULL,
	"amended_by" text,
	"amended_at" timestamp (3) with time zone,
	"revision" integer DEFAULT 1 NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "heap_job_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "heap_material" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"density_kg_per_m3" double precision,
	"moisture" double precision NOT NULL,
	"carbon" double precision NOT NULL,
	"nitrogen" double precision NOT NULL,
	"from" text NOT NULL,
	"by" text NOT NULL,
	"entered_at" timestamp (3) with time zone NOT NULL,
	"amended_by" text,
	"amended_at" timestamp (3) with time zone,
	"revision" integer DEFAULT 1 NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "heap_material_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "probe_set" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"source_id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"section" jsonb NOT NULL,
	"places" jsonb NOT NULL,
	"text" text NOT NULL,
	"by" text NOT NULL,
	"entered_at" timestamp (3) with time zone NOT NULL,
	"amended_by" text,
	"amended_at" timestamp (3) with time zone,
	"revision" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "probe_set_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
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
CREATE TABLE "house_night" (
	"holding_id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"night" date NOT NULL,
	"body" jsonb NOT NULL,
	"made_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "house_night_holding_id_house_id_night_pk" PRIMARY KEY("holding_id","house_id","night")
);
--> statement-breakpoint
CREATE TABLE "import_batch" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"name" text NOT NULL,
	"bytes" bigint NOT NULL,
	"received" bigint DEFAULT 0 NOT NULL,
	"state" text NOT NULL,
	"layout" jsonb,
	"found" jsonb,
	"done_bytes" bigint DEFAULT 0 NOT NULL,
	"done_lines" bigint DEFAULT 0 NOT NULL,
	"brought" bigint DEFAULT 0 NOT NULL,
	"duplicates" bigint DEFAULT 0 NOT NULL,
	"faults" bigint DEFAULT 0 NOT NULL,
	"fault_bytes" bigint DEFAULT 0 NOT NULL,
	"problem" text,
	"by" text NOT NULL,
	"created_at" timestamp (3) with time zone NOT NULL,
	"ended_at" timestamp (3) with time zone,
	CONSTRAINT "import_batch_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "import_part" (
	"holding_id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"part" integer NOT NULL,
	"point" bigint NOT NULL,
	"times" bigint[] NOT NULL,
	CONSTRAINT "import_part_holding_id_batch_id_part_point_pk" PRIMARY KEY("holding_id","batch_id","part","point")
);
--> statement-breakpoint
ALTER TABLE "heap_entry" ADD COLUMN "smell" text;--> statement-breakpoint
ALTER TABLE "heap_entry" ADD COLUMN "squeeze" text;--> statement-breakpoint
ALTER TABLE "attachment" ADD CONSTRAINT "attachment_holding_id_entry_id_heap_entry_holding_id_id_fk" FOREIGN KEY ("holding_id","entry_id") REFERENCES "public"."heap_entry"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calendar_link" ADD CONSTRAINT "calendar_link_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "finding_dismissal" ADD CONSTRAINT "finding_dismissal_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heap_job" ADD CONSTRAINT "heap_job_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heap_material" ADD CONSTRAINT "heap_material_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "probe_set" ADD CONSTRAINT "probe_set_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heap_cost" ADD CONSTRAINT "heap_cost_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "money_book" ADD CONSTRAINT "money_book_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_schedule" ADD CONSTRAINT "report_schedule_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_sent" ADD CONSTRAINT "report_sent_holding_id_schedule_id_report_schedule_holding_id_id_fk" FOREIGN KEY ("holding_id","schedule_id") REFERENCES "public"."report_schedule"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "house_night" ADD CONSTRAINT "house_night_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_batch" ADD CONSTRAINT "import_batch_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_part" ADD CONSTRAINT "import_part_holding_id_batch_id_import_batch_holding_id_id_fk" FOREIGN KEY ("holding_id","batch_id") REFERENCES "public"."import_batch"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "attachment_entry" ON "attachment" USING btree ("holding_id","entry_id");--> statement-breakpoint
CREATE UNIQUE INDEX "calendar_link_hash" ON "calendar_link" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "finding_dismissal_at" ON "finding_dismissal" USING btree ("holding_id","source_id","at");--> statement-breakpoint
CREATE INDEX "heap_job_due" ON "heap_job" USING btree ("holding_id","source_id","due_on");--> statement-breakpoint
CREATE UNIQUE INDEX "heap_material_name" ON "heap_material" USING btree ("holding_id",lower("name")) WHERE removed_at is null;--> statement-breakpoint
CREATE INDEX "probe_set_at" ON "probe_set" USING btree ("holding_id","source_id","at");--> statement-breakpoint
CREATE INDEX "heap_cost_source" ON "heap_cost" USING btree ("holding_id","source_id","paid_on");--> statement-breakpoint
CREATE INDEX "import_batch_house" ON "import_batch" USING btree ("holding_id","house_id","created_at");