CREATE TYPE "public"."export_state" AS ENUM('queued', 'running', 'done', 'failed', 'cancelled');--> statement-breakpoint
CREATE TABLE "export_jobs" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"owner_id" uuid,
	"token_hash" text,
	"key" text NOT NULL,
	"options" jsonb NOT NULL,
	"study_id" uuid,
	"version" integer,
	"document" jsonb,
	"state" "export_state" DEFAULT 'queued' NOT NULL,
	"done" integer DEFAULT 0 NOT NULL,
	"total" integer,
	"result" "bytea",
	"result_type" text,
	"result_name" text,
	"error_code" text,
	"error_message" text,
	"attempts" integer DEFAULT 0 NOT NULL,
	"worker" uuid,
	"lease_until" timestamp (3) with time zone,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"ended_at" timestamp (3) with time zone,
	CONSTRAINT "export_jobs_one_owner" CHECK (num_nonnulls("export_jobs"."owner_id", "export_jobs"."token_hash") <= 1),
	CONSTRAINT "export_jobs_of_a_study" CHECK (("export_jobs"."study_id" is null) = ("export_jobs"."version" is null) and ("export_jobs"."study_id" is null or "export_jobs"."document" is null)),
	CONSTRAINT "export_jobs_done_has_file" CHECK (("export_jobs"."state" = 'done') = ("export_jobs"."result" is not null))
);
--> statement-breakpoint
ALTER TABLE "export_jobs" ADD CONSTRAINT "export_jobs_owner_id_users_id_fk" FOREIGN KEY ("owner_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "export_jobs" ADD CONSTRAINT "export_jobs_study_id_studies_id_fk" FOREIGN KEY ("study_id") REFERENCES "public"."studies"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "export_jobs_waiting" ON "export_jobs" USING btree ("created_at") WHERE "export_jobs"."state" in ('queued', 'running');--> statement-breakpoint
CREATE INDEX "export_jobs_key" ON "export_jobs" USING btree ("key");--> statement-breakpoint
CREATE INDEX "export_jobs_owner" ON "export_jobs" USING btree ("owner_id");--> statement-breakpoint
CREATE INDEX "export_jobs_study" ON "export_jobs" USING btree ("study_id");--> statement-breakpoint
CREATE INDEX "export_jobs_ended" ON "export_jobs" USING btree ("ended_at") WHERE "export_jobs"."ended_at" is not null;