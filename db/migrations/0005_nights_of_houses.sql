CREATE TABLE "house_night" (
	"holding_id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"night" date NOT NULL,
	"body" jsonb NOT NULL,
	"made_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "house_night_holding_id_house_id_night_pk" PRIMARY KEY("holding_id","house_id","night")
);
--> statement-breakpoint
ALTER TABLE "house_night" ADD CONSTRAINT "house_night_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;