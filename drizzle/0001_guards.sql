-- What the schema language cannot say: holds of one member never overlap, and the audit list is append only.
CREATE EXTENSION IF NOT EXISTS btree_gist;
--> statement-breakpoint
ALTER TABLE "holds" ADD CONSTRAINT "holds_no_overlap"
  EXCLUDE USING gist ("member_id" WITH =, tstzrange("started_at", coalesce("ended_at", 'infinity'), '[)') WITH &&);
--> statement-breakpoint
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'rows of % are never changed', TG_TABLE_NAME;
END $$;
--> statement-breakpoint
CREATE TRIGGER "audit_append_only" BEFORE UPDATE OR DELETE ON "audit_entries"
  FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER "screens_kept" BEFORE UPDATE ON "readiness_screens"
  FOR EACH ROW EXECUTE FUNCTION refuse_change();
