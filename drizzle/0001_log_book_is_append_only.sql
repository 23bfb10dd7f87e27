CREATE FUNCTION refuse_log_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
	RAISE EXCEPTION 'The log book is append-only.';
END;
$$;
--> statement-breakpoint
CREATE TRIGGER log_entries_append_only BEFORE UPDATE OR DELETE ON "log_entries" FOR EACH ROW EXECUTE FUNCTION refuse_log_change();
--> statement-breakpoint
ALTER TABLE "text_chunks" ALTER COLUMN "data" SET STORAGE EXTERNAL;
--> statement-breakpoint
ALTER TABLE "overlap_runs" ALTER COLUMN "lower" SET STORAGE EXTERNAL;
