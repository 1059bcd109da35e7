CREATE TABLE "account" (
	"id" uuid PRIMARY KEY NOT NULL,
	"account_id" text NOT NULL,
	"provider_id" text NOT NULL,
	"user_id" uuid NOT NULL,
	"access_token" text,
	"refresh_token" text,
	"id_token" text,
	"access_token_expires_at" timestamp (3) with time zone,
	"refresh_token_expires_at" timestamp (3) with time zone,
	"scope" text,
	"password" text,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "invitation" (
	"id" uuid PRIMARY KEY NOT NULL,
	"organization_id" uuid NOT NULL,
	"email" text NOT NULL,
	"role" text,
	"status" text DEFAULT 'pending' NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"inviter_id" uuid NOT NULL
);
--> statement-breakpoint
CREATE TABLE "member" (
	"id" uuid PRIMARY KEY NOT NULL,
	"organization_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "organization" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"slug" text NOT NULL,
	"logo" text,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"metadata" text,
	CONSTRAINT "organization_slug_unique" UNIQUE("slug")
);
--> statement-breakpoint
CREATE TABLE "session" (
	"id" uuid PRIMARY KEY NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"token" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"ip_address" text,
	"user_agent" text,
	"user_id" uuid NOT NULL,
	"active_organization_id" uuid,
	CONSTRAINT "session_token_unique" UNIQUE("token")
);
--> statement-breakpoint
CREATE TABLE "user" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"email_verified" boolean DEFAULT false NOT NULL,
	"image" text,
	"preferences" text,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "user_email_unique" UNIQUE("email")
);
--> statement-breakpoint
CREATE TABLE "verification" (
	"id" uuid PRIMARY KEY NOT NULL,
	"identifier" text NOT NULL,
	"value" text NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "heap_entry" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"source_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"text" text NOT NULL,
	"materials" jsonb NOT NULL,
	"litres_of_water" double precision,
	"volume_m3" double precision,
	"by" text NOT NULL,
	"entered_at" timestamp (3) with time zone NOT NULL,
	"amended_by" text,
	"amended_at" timestamp (3) with time zone,
	"revision" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "heap_entry_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "api_key" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"role" text NOT NULL,
	"hash" text NOT NULL,
	"created_by" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"last_used_at" timestamp (3) with time zone,
	"revoked_at" timestamp (3) with time zone,
	CONSTRAINT "api_key_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "audit_log" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"by" text NOT NULL,
	"action" text NOT NULL,
	"subject" text NOT NULL,
	"detail" jsonb DEFAULT '{}'::jsonb NOT NULL,
	CONSTRAINT "audit_log_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "idempotency" (
	"holding_id" uuid NOT NULL,
	"key" text NOT NULL,
	"caller" text NOT NULL,
	"request_hash" text NOT NULL,
	"status" bigint,
	"body" jsonb,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_holding_id_caller_key_pk" PRIMARY KEY("holding_id","caller","key")
);
--> statement-breakpoint
CREATE TABLE "sink_message" (
	"id" uuid PRIMARY KEY NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"from" text NOT NULL,
	"to" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "rule" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"channel_id" uuid NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"revision" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"retired_at" timestamp (3) with time zone,
	CONSTRAINT "rule_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "rule_version" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"rule_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"status" text NOT NULL,
	"body" jsonb NOT NULL,
	"why" text,
	"by" text NOT NULL,
	"drafted_at" timestamp (3) with time zone NOT NULL,
	"forced_at" timestamp (3) with time zone,
	"ended_at" timestamp (3) with time zone,
	CONSTRAINT "rule_version_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "clock_anchor" (
	"id" integer PRIMARY KEY NOT NULL,
	"anchor_real" timestamp (3) with time zone NOT NULL,
	"anchor_app" timestamp (3) with time zone NOT NULL,
	"rate" double precision NOT NULL
);
--> statement-breakpoint
CREATE TABLE "control_memory" (
	"holding_id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"memory" jsonb,
	"memory_at" timestamp (3) with time zone,
	"taken" bigint DEFAULT 0 NOT NULL,
	"plan_revision" bigint DEFAULT 0 NOT NULL,
	"state" jsonb,
	"state_at" timestamp (3) with time zone,
	"epoch" bigint DEFAULT 0 NOT NULL,
	CONSTRAINT "control_memory_holding_id_house_id_pk" PRIMARY KEY("holding_id","house_id")
);
--> statement-breakpoint
CREATE TABLE "decision" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"channel_id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"state" text NOT NULL,
	"claim" text NOT NULL,
	CONSTRAINT "decision_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "leader" (
	"id" integer PRIMARY KEY NOT NULL,
	"holder" uuid,
	"epoch" bigint NOT NULL,
	"until" timestamp (3) with time zone NOT NULL,
	"heartbeat" timestamp (3) with time zone NOT NULL,
	"spool" bigint DEFAULT 0 NOT NULL,
	"last_step" timestamp (3) with time zone
);
--> statement-breakpoint
CREATE TABLE "person_command" (
	"holding_id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"number" bigint NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"by" text NOT NULL,
	"body" jsonb NOT NULL,
	CONSTRAINT "person_command_holding_id_house_id_number_pk" PRIMARY KEY("holding_id","house_id","number")
);
--> statement-breakpoint
CREATE TABLE "relay_report" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"channel_id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"state" text NOT NULL,
	"number" bigint NOT NULL,
	CONSTRAINT "relay_report_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "switching" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"channel_id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"from" text NOT NULL,
	"to" text NOT NULL,
	"claim" text NOT NULL,
	"number" bigint,
	"trip" text,
	"rule_id" uuid,
	"version" integer,
	"explanation" jsonb NOT NULL,
	CONSTRAINT "switching_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "night" (
	"holding_id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"source_id" uuid NOT NULL,
	"night" date NOT NULL,
	"body" jsonb NOT NULL,
	"made_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "night_holding_id_source_id_night_pk" PRIMARY KEY("holding_id","source_id","night")
);
--> statement-breakpoint
CREATE TABLE "alarm" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid,
	"key" text NOT NULL,
	"kind" text NOT NULL,
	"about" jsonb NOT NULL,
	"data" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"raised_at" timestamp (3) with time zone NOT NULL,
	"cleared_at" timestamp (3) with time zone,
	"acknowledged_at" timestamp (3) with time zone,
	"acknowledged_by" text,
	CONSTRAINT "alarm_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "alarm_event" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"alarm_id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"kind" text NOT NULL,
	"by" text,
	"note" text,
	CONSTRAINT "alarm_event_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "calibration" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"point_id" uuid NOT NULL,
	"from" timestamp (3) with time zone NOT NULL,
	"offset" double precision NOT NULL,
	"gain" double precision NOT NULL,
	"by" text NOT NULL,
	CONSTRAINT "calibration_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "channel" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"key" text NOT NULL,
	"label" text NOT NULL,
	"node_id" uuid NOT NULL,
	"relay" integer NOT NULL,
	"source_id" uuid,
	"frost_help" boolean NOT NULL,
	"contact" text NOT NULL,
	"load" jsonb NOT NULL,
	"min_on_s" integer NOT NULL,
	"min_off_s" integer NOT NULL,
	"starts_per_hour" double precision,
	"longest_on_s" integer,
	"high_limit" jsonb,
	"run_proof" jsonb,
	"fallback" jsonb,
	"flow" jsonb,
	"proved_at" timestamp (3) with time zone,
	"revision" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "channel_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "house" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"zone" text NOT NULL,
	"latitude" double precision NOT NULL,
	"longitude" double precision NOT NULL,
	"altitude" double precision NOT NULL,
	"frost_limit" double precision,
	"frost_alarm" double precision,
	"plan_revision" bigint DEFAULT 1 NOT NULL,
	"revision" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "house_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "interlock" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"channel_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"other_id" uuid NOT NULL,
	"delay_s" integer NOT NULL,
	"frost_may_break" boolean NOT NULL,
	"revision" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "interlock_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "lockout" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"channel_id" uuid NOT NULL,
	"why" text NOT NULL,
	"by" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"removed_by" text,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "lockout_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "loop" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"source_id" uuid NOT NULL,
	"channel_id" uuid NOT NULL,
	"intake_point_id" uuid NOT NULL,
	"return_point_id" uuid NOT NULL,
	"revision" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "loop_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "node" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"key" text NOT NULL,
	"kind" text NOT NULL,
	"report_every_s" integer NOT NULL,
	"channels" integer NOT NULL,
	"token_hash" text NOT NULL,
	"former_token_hash" text,
	"former_token_until" timestamp (3) with time zone,
	"revoked_at" timestamp (3) with time zone,
	"status" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"last_heard_at" timestamp (3) with time zone,
	"revision" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "node_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "point" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"number" bigint GENERATED ALWAYS AS IDENTITY (sequence name "point_number_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"house_id" uuid NOT NULL,
	"node_id" uuid,
	"key" text NOT NULL,
	"name" text NOT NULL,
	"role" text NOT NULL,
	"unit" text NOT NULL,
	"min" double precision,
	"max" double precision,
	"stale_after_s" integer,
	"max_rate" double precision,
	"frozen_after_s" integer,
	"sensor" text,
	"derived" jsonb,
	"revision" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "point_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
CREATE TABLE "source" (
	"holding_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"house_id" uuid NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"kind" text NOT NULL,
	"core_point_id" uuid,
	"base_point_id" uuid,
	"core_floor" double precision,
	"daily_limit_s" integer,
	"ready_level" double precision,
	"ready_for_s" integer,
	"revision" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"removed_at" timestamp (3) with time zone,
	CONSTRAINT "source_holding_id_id_pk" PRIMARY KEY("holding_id","id")
);
--> statement-breakpoint
ALTER TABLE "account" ADD CONSTRAINT "account_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_organization_id_organization_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_inviter_id_user_id_fk" FOREIGN KEY ("inviter_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_organization_id_organization_id_fk" FOREIGN KEY ("organization_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heap_entry" ADD CONSTRAINT "heap_entry_holding_id_source_id_source_holding_id_id_fk" FOREIGN KEY ("holding_id","source_id") REFERENCES "public"."source"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "api_key" ADD CONSTRAINT "api_key_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule" ADD CONSTRAINT "rule_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_version" ADD CONSTRAINT "rule_version_holding_id_rule_id_rule_holding_id_id_fk" FOREIGN KEY ("holding_id","rule_id") REFERENCES "public"."rule"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "control_memory" ADD CONSTRAINT "control_memory_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decision" ADD CONSTRAINT "decision_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "person_command" ADD CONSTRAINT "person_command_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "switching" ADD CONSTRAINT "switching_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "night" ADD CONSTRAINT "night_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alarm" ADD CONSTRAINT "alarm_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alarm_event" ADD CONSTRAINT "alarm_event_holding_id_alarm_id_alarm_holding_id_id_fk" FOREIGN KEY ("holding_id","alarm_id") REFERENCES "public"."alarm"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calibration" ADD CONSTRAINT "calibration_holding_id_point_id_point_holding_id_id_fk" FOREIGN KEY ("holding_id","point_id") REFERENCES "public"."point"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "channel" ADD CONSTRAINT "channel_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "channel" ADD CONSTRAINT "channel_holding_id_node_id_node_holding_id_id_fk" FOREIGN KEY ("holding_id","node_id") REFERENCES "public"."node"("holding_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "house" ADD CONSTRAINT "house_holding_id_organization_id_fk" FOREIGN KEY ("holding_id") REFERENCES "public"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "interlock" ADD CONSTRAINT "interlock_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "lockout" ADD CONSTRAINT "lockout_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "loop" ADD CONSTRAINT "loop_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "node" ADD CONSTRAINT "node_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "point" ADD CONSTRAINT "point_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "source" ADD CONSTRAINT "source_holding_id_house_id_house_holding_id_id_fk" FOREIGN KEY ("holding_id","house_id") REFERENCES "public"."house"("holding_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "account_user" ON "account" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "invitation_organization" ON "invitation" USING btree ("organization_id");--> statement-breakpoint
CREATE UNIQUE INDEX "member_once" ON "member" USING btree ("organization_id","user_id");--> statement-breakpoint
CREATE INDEX "member_user" ON "member" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "session_user" ON "session" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "verification_identifier" ON "verification" USING btree ("identifier");--> statement-breakpoint
CREATE INDEX "heap_entry_at" ON "heap_entry" USING btree ("holding_id","source_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "api_key_hash" ON "api_key" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "audit_log_at" ON "audit_log" USING btree ("holding_id","at");--> statement-breakpoint
CREATE INDEX "sink_message_to" ON "sink_message" USING btree ("to","at");--> statement-breakpoint
CREATE UNIQUE INDEX "rule_slug" ON "rule" USING btree ("holding_id","slug");--> statement-breakpoint
CREATE UNIQUE INDEX "rule_version_number" ON "rule_version" USING btree ("rule_id","number");--> statement-breakpoint
CREATE UNIQUE INDEX "rule_version_draft" ON "rule_version" USING btree ("rule_id") WHERE status = 'draft';--> statement-breakpoint
CREATE UNIQUE INDEX "rule_version_in_force" ON "rule_version" USING btree ("rule_id") WHERE status = 'in-force';--> statement-breakpoint
CREATE INDEX "rule_version_rule" ON "rule_version" USING btree ("holding_id","rule_id");--> statement-breakpoint
CREATE INDEX "decision_channel" ON "decision" USING btree ("channel_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "decision_once" ON "decision" USING btree ("channel_id","at","claim","state");--> statement-breakpoint
CREATE INDEX "relay_report_channel" ON "relay_report" USING btree ("channel_id","at");--> statement-breakpoint
CREATE INDEX "switching_at" ON "switching" USING btree ("holding_id","house_id","at");--> statement-breakpoint
CREATE INDEX "switching_channel" ON "switching" USING btree ("channel_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "switching_number" ON "switching" USING btree ("channel_id","number") WHERE number is not null;--> statement-breakpoint
CREATE UNIQUE INDEX "switching_trip" ON "switching" USING btree ("channel_id","trip") WHERE trip is not null;--> statement-breakpoint
CREATE INDEX "night_house" ON "night" USING btree ("holding_id","house_id","night");--> statement-breakpoint
CREATE UNIQUE INDEX "alarm_standing" ON "alarm" USING btree ("holding_id","key") WHERE cleared_at is null;--> statement-breakpoint
CREATE INDEX "alarm_raised" ON "alarm" USING btree ("holding_id","raised_at");--> statement-breakpoint
CREATE INDEX "alarm_event_alarm" ON "alarm_event" USING btree ("alarm_id","at");--> statement-breakpoint
CREATE INDEX "calibration_point" ON "calibration" USING btree ("point_id","from");--> statement-breakpoint
CREATE UNIQUE INDEX "channel_number" ON "channel" USING btree ("holding_id","house_id","number") WHERE removed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "channel_key" ON "channel" USING btree ("holding_id","house_id","key") WHERE removed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "channel_relay" ON "channel" USING btree ("holding_id","node_id","relay") WHERE removed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "house_slug" ON "house" USING btree ("holding_id","slug") WHERE removed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "lockout_once" ON "lockout" USING btree ("channel_id") WHERE removed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "loop_slug" ON "loop" USING btree ("holding_id","slug") WHERE removed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "node_key" ON "node" USING btree ("holding_id","house_id","key") WHERE removed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "node_token" ON "node" USING btree ("token_hash");--> statement-breakpoint
CREATE INDEX "node_former_token" ON "node" USING btree ("former_token_hash");--> statement-breakpoint
CREATE UNIQUE INDEX "point_key" ON "point" USING btree ("holding_id","house_id","key") WHERE removed_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "point_number" ON "point" USING btree ("number");--> statement-breakpoint
CREATE UNIQUE INDEX "source_slug" ON "source" USING btree ("holding_id","slug") WHERE removed_at is null;