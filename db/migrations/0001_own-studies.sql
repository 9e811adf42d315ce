CREATE TYPE "public"."paper_size" AS ENUM('a4', 'letter');--> statement-breakpoint
CREATE TYPE "public"."value_names" AS ENUM('american', 'british');--> statement-breakpoint
DROP INDEX "studies_owner_updated";--> statement-breakpoint
ALTER TABLE "studies" ALTER COLUMN "created_at" SET DATA TYPE timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "studies" ALTER COLUMN "created_at" SET DEFAULT now();--> statement-breakpoint
ALTER TABLE "studies" ALTER COLUMN "updated_at" SET DATA TYPE timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "studies" ALTER COLUMN "updated_at" SET DEFAULT now();--> statement-breakpoint
ALTER TABLE "studies" ALTER COLUMN "deleted_at" SET DATA TYPE timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "study_versions" ALTER COLUMN "created_at" SET DATA TYPE timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "study_versions" ALTER COLUMN "created_at" SET DEFAULT now();--> statement-breakpoint
ALTER TABLE "studies" ADD COLUMN "measures" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "studies" ADD COLUMN "seconds" double precision DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "studies" ADD COLUMN "strip" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "study_versions" ADD COLUMN "title" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "study_versions" ADD COLUMN "save_id" uuid;--> statement-breakpoint
ALTER TABLE "users" ADD COLUMN "value_names" "value_names" DEFAULT 'american' NOT NULL;--> statement-breakpoint
ALTER TABLE "users" ADD COLUMN "paper_size" "paper_size" DEFAULT 'a4' NOT NULL;--> statement-breakpoint
ALTER TABLE "users" ADD COLUMN "session_epoch" integer DEFAULT 0 NOT NULL;--> statement-breakpoint
CREATE INDEX "studies_own_changed" ON "studies" USING btree ("owner_id","updated_at","id") WHERE "studies"."deleted_at" is null;--> statement-breakpoint
CREATE INDEX "studies_own_title" ON "studies" USING btree ("owner_id",lower("title"),"id") WHERE "studies"."deleted_at" is null;--> statement-breakpoint
CREATE INDEX "studies_own_length" ON "studies" USING btree ("owner_id","seconds","id") WHERE "studies"."deleted_at" is null;--> statement-breakpoint
CREATE INDEX "studies_deleted_changed" ON "studies" USING btree ("owner_id","updated_at","id") WHERE "studies"."deleted_at" is not null;--> statement-breakpoint
CREATE INDEX "studies_deleted_title" ON "studies" USING btree ("owner_id",lower("title"),"id") WHERE "studies"."deleted_at" is not null;--> statement-breakpoint
CREATE INDEX "studies_deleted_length" ON "studies" USING btree ("owner_id","seconds","id") WHERE "studies"."deleted_at" is not null;--> statement-breakpoint
CREATE INDEX "studies_deleted" ON "studies" USING btree ("deleted_at") WHERE "studies"."deleted_at" is not null;--> statement-breakpoint
CREATE UNIQUE INDEX "study_versions_save" ON "study_versions" USING btree ("saved_by","save_id");