UPDATE "study_versions" SET "title" = coalesce("document"->>'title', '') WHERE "title" = '';--> statement-breakpoint
-- Titles are searched by trigrams where the server has them and lets the database's owner add them, as PostgreSQL 13 and later
-- do. Elsewhere a search reads the owner's stretch of "studies_own_title", which is slower with many studies, and works.
DO $$
BEGIN
	CREATE EXTENSION IF NOT EXISTS "pg_trgm";
	CREATE EXTENSION IF NOT EXISTS "btree_gin";
	CREATE INDEX IF NOT EXISTS "studies_title_trigrams" ON "studies" USING gin ("owner_id", lower("title") gin_trgm_ops);
EXCEPTION WHEN insufficient_privilege OR undefined_file OR feature_not_supported OR undefined_object THEN
	RAISE NOTICE 'Titles are searched without trigrams.';
END
$$;
