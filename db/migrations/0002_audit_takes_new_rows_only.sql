-- The comment tells the migrations to grant no more than that; the triggers hold it where app and owner are one role.
COMMENT ON TABLE "audit_log" IS 'append-only: who did what, never changed and never taken away';
--> statement-breakpoint
CREATE TRIGGER audit_log_never_removed BEFORE DELETE ON "audit_log" FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER audit_log_never_emptied BEFORE TRUNCATE ON "audit_log" FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
