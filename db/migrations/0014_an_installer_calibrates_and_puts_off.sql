ALTER TABLE "attachment" ALTER COLUMN "entry_id" DROP NOT NULL;--> statement-breakpoint
ALTER TABLE "attachment" ADD COLUMN "point_id" uuid;--> statement-breakpoint
ALTER TABLE "attachment" ADD COLUMN "shows" text;--> statement-breakpoint
ALTER TABLE "house" ADD COLUMN "setup_skipped" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "calibration" ADD COLUMN "kind" text DEFAULT 'typed' NOT NULL;--> statement-breakpoint
ALTER TABLE "calibration" ADD COLUMN "places" jsonb;--> statement-breakpoint
ALTER TABLE "calibration" ADD COLUMN "residual" double precision;--> statement-breakpoint
ALTER TABLE "calibration" ADD COLUMN "note" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "attachment" ADD CONSTRAINT "attachment_holding_id_point_id_point_holding_id_id_fk" FOREIGN KEY ("holding_id","point_id") REFERENCES "public"."point"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "attachment_point" ON "attachment" USING btree ("holding_id","point_id");