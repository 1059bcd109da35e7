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
ALTER TABLE "import_batch" ADD CONSTRAINT "import_batch_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_part" ADD CONSTRAINT "import_part_holding_id_batch_id_import_batch_holding_id_id_fk" FOREIGN KEY ("holding_id","batch_id") REFERENCES "public"."import_batch"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "import_batch_house" ON "import_batch" USING btree ("holding_id","house_id","created_at");