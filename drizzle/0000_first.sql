CREATE TABLE "analyses" (
	"id" text PRIMARY KEY NOT NULL,
	"study_id" text NOT NULL,
	"tree_set_id" text NOT NULL,
	"overlap_run_id" text NOT NULL,
	"plan" jsonb NOT NULL,
	"hash" text NOT NULL,
	"decisions" jsonb NOT NULL,
	"status" text NOT NULL,
	"progress" jsonb,
	"result" jsonb,
	"failure" jsonb,
	"declared_at" timestamp with time zone,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp with time zone,
	"heartbeat_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	"deleted_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "attempts" (
	"key" text PRIMARY KEY NOT NULL,
	"count" integer NOT NULL,
	"window_start" timestamp with time zone NOT NULL
);
--> statement-breakpoint
CREATE TABLE "labs" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"personal" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "log_entries" (
	"id" bigserial PRIMARY KEY NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"user_id" text,
	"lab_id" text,
	"study_id" text,
	"action" text NOT NULL,
	"detail" jsonb NOT NULL,
	"previous_hash" text NOT NULL,
	"hash" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "memberships" (
	"lab_id" text NOT NULL,
	"user_id" text NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "memberships_lab_id_user_id_pk" PRIMARY KEY("lab_id","user_id")
);
--> statement-breakpoint
CREATE TABLE "name_decisions" (
	"id" bigserial PRIMARY KEY NOT NULL,
	"study_id" text NOT NULL,
	"from_name" text NOT NULL,
	"to_tip" text,
	"why" text DEFAULT '' NOT NULL,
	"withdrawn" boolean DEFAULT false NOT NULL,
	"decided_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "overlap_runs" (
	"id" text PRIMARY KEY NOT NULL,
	"study_id" text NOT NULL,
	"label" text NOT NULL,
	"measure" text NOT NULL,
	"text_hash" text,
	"species" jsonb NOT NULL,
	"lower" "bytea" NOT NULL,
	"reading" jsonb NOT NULL,
	"remarks" jsonb NOT NULL,
	"replaces" text,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "reports" (
	"id" text PRIMARY KEY NOT NULL,
	"study_id" text NOT NULL,
	"analysis_id" text NOT NULL,
	"title" text NOT NULL,
	"caption" text NOT NULL,
	"caption_edited" boolean DEFAULT false NOT NULL,
	"notes" text DEFAULT '' NOT NULL,
	"figure" jsonb NOT NULL,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "studies" (
	"id" text PRIMARY KEY NOT NULL,
	"lab_id" text NOT NULL,
	"title" text NOT NULL,
	"question" text DEFAULT '' NOT NULL,
	"created_by" text NOT NULL,
	"is_example" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "text_chunks" (
	"hash" text NOT NULL,
	"position" integer NOT NULL,
	"data" "bytea" NOT NULL,
	CONSTRAINT "text_chunks_hash_position_pk" PRIMARY KEY("hash","position")
);
--> statement-breakpoint
CREATE TABLE "texts" (
	"hash" text PRIMARY KEY NOT NULL,
	"bytes" bigint NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "tokens" (
	"id" text PRIMARY KEY NOT NULL,
	"user_id" text NOT NULL,
	"label" text NOT NULL,
	"hash" text NOT NULL,
	"last_used_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"revoked_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "tree_sets" (
	"id" text PRIMARY KEY NOT NULL,
	"study_id" text NOT NULL,
	"label" text NOT NULL,
	"text_hash" text NOT NULL,
	"age_unit" text NOT NULL,
	"kind" text NOT NULL,
	"tree_count" integer NOT NULL,
	"summary" jsonb NOT NULL,
	"remarks" jsonb NOT NULL,
	"spread_confirmed" boolean DEFAULT false NOT NULL,
	"replaces" text,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "users" (
	"id" text PRIMARY KEY NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"passphrase_hash" text NOT NULL,
	"session_version" integer DEFAULT 1 NOT NULL,
	"is_demo" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "analyses" ADD CONSTRAINT "analyses_study_id_studies_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."studies"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "analyses" ADD CONSTRAINT "analyses_tree_set_id_tree_sets_id_fk" FOREIGN KEY ("tree_set_id") REFERENCES "public"."tree_sets"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "analyses" ADD CONSTRAINT "analyses_overlap_run_id_overlap_runs_id_fk" FOREIGN KEY ("overlap_run_id") REFERENCES "public"."overlap_runs"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "analyses" ADD CONSTRAINT "analyses_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_lab_id_labs_id_fk" FOREIGN KEY ("lab_id") REFERENCES "public"."labs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "name_decisions" ADD CONSTRAINT "name_decisions_study_id_studies_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."studies"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "name_decisions" ADD CONSTRAINT "name_decisions_decided_by_users_id_fk" FOREIGN KEY ("decided_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "overlap_runs" ADD CONSTRAINT "overlap_runs_study_id_studies_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."studies"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "overlap_runs" ADD CONSTRAINT "overlap_runs_text_hash_texts_hash_fk" FOREIGN KEY ("text_hash") REFERENCES "public"."texts"("hash") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "overlap_runs" ADD CONSTRAINT "overlap_runs_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_study_id_studies_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."studies"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_analysis_id_analyses_id_fk" FOREIGN KEY ("analysis_id") REFERENCES "public"."analyses"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "studies" ADD CONSTRAINT "studies_lab_id_labs_id_fk" FOREIGN KEY ("lab_id") REFERENCES "public"."labs"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "studies" ADD CONSTRAINT "studies_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "text_chunks" ADD CONSTRAINT "text_chunks_hash_texts_hash_fk" FOREIGN KEY ("hash") REFERENCES "public"."texts"("hash") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tokens" ADD CONSTRAINT "tokens_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tree_sets" ADD CONSTRAINT "tree_sets_study_id_studies_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."studies"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tree_sets" ADD CONSTRAINT "tree_sets_text_hash_texts_hash_fk" FOREIGN KEY ("text_hash") REFERENCES "public"."texts"("hash") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tree_sets" ADD CONSTRAINT "tree_sets_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "analyses_study" ON "analyses" USING btree ("study_id");--> statement-breakpoint
CREATE UNIQUE INDEX "analyses_hash" ON "analyses" USING btree ("study_id","hash");--> statement-breakpoint
CREATE INDEX "log_entries_study" ON "log_entries" USING btree ("study_id");--> statement-breakpoint
CREATE INDEX "log_entries_lab" ON "log_entries" USING btree ("lab_id");--> statement-breakpoint
CREATE INDEX "memberships_user" ON "memberships" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "name_decisions_study" ON "name_decisions" USING btree ("study_id");--> statement-breakpoint
CREATE INDEX "overlap_runs_study" ON "overlap_runs" USING btree ("study_id");--> statement-breakpoint
CREATE INDEX "reports_study" ON "reports" USING btree ("study_id");--> statement-breakpoint
CREATE INDEX "studies_lab" ON "studies" USING btree ("lab_id");--> statement-breakpoint
CREATE UNIQUE INDEX "tokens_hash" ON "tokens" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "tree_sets_study" ON "tree_sets" USING btree ("study_id");--> statement-breakpoint
CREATE UNIQUE INDEX "users_email" ON "users" USING btree (lower("email"));