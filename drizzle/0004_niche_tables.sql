CREATE TABLE "niche_tables" (
	"id" text PRIMARY KEY NOT NULL,
	"study_id" text NOT NULL,
	"label" text NOT NULL,
	"text_hash" text NOT NULL,
	"species" jsonb NOT NULL,
	"variables" jsonb NOT NULL,
	"remarks" jsonb NOT NULL,
	"replaces" text,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone
);
--> statement-breakpoint
ALTER TABLE "tree_sets" ADD COLUMN "about" jsonb;--> statement-breakpoint
ALTER TABLE "niche_tables" ADD CONSTRAINT "niche_tables_study_id_studies_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."studies"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "niche_tables" ADD CONSTRAINT "niche_tables_text_hash_texts_hash_fk" FOREIGN KEY ("text_hash") REFERENCES "public"."texts"("hash") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "niche_tables" ADD CONSTRAINT "niche_tables_created_by_users_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "niche_tables_study" ON "niche_tables" USING btree ("study_id");