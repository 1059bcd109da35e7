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
ALTER TABLE "heap_entry" ADD COLUMN "smell" text;--> statement-breakpoint
ALTER TABLE "heap_entry" ADD COLUMN "squeeze" text;--> statement-breakpoint
ALTER TABLE "attachment" ADD CONSTRAINT "attachment_holding_id_entry_id_heap_entry_holding_id_id_fk" FOREIGN KEY ("holding_id","entry_id") REFERENCES "public"."heap_entry"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calendar_link" ADD CONSTRAINT "calendar_link_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "finding_dismissal" ADD CONSTRAINT "finding_dismissal_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heap_job" ADD CONSTRAINT "heap_job_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heap_material" ADD CONSTRAINT "heap_material_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "probe_set" ADD CONSTRAINT "probe_set_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "attachment_entry" ON "attachment" USING btree ("holding_id","entry_id");--> statement-breakpoint
CREATE UNIQUE INDEX "calendar_link_hash" ON "calendar_link" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "finding_dismissal_at" ON "finding_dismissal" USING btree ("holding_id","source_id","at");--> statement-breakpoint
CREATE INDEX "heap_job_due" ON "heap_job" USING btree ("holding_id","source_id","due_on");--> statement-breakpoint
CREATE UNIQUE INDEX "heap_material_name" ON "heap_material" USING btree ("holding_id",lower("name")) WHERE removed_at is null;--> statement-breakpoint
CREATE INDEX "probe_set_at" ON "probe_set" USING btree ("holding_id","source_id","at");