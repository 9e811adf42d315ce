-- The owner left the index of trigrams: with the owner in it every search read the places of all the owner's studies, and was
-- dearer than reading the whole table. Few titles match a search, and those of others are left out afterwards; where many
-- would, the owner's stretch of "studies_own_title" and its like is read instead. "btree_gin" is not needed any more; it stays,
-- since others may use it.
DO $$
BEGIN
	CREATE EXTENSION IF NOT EXISTS "pg_trgm";
	DROP INDEX IF EXISTS "studies_title_trigrams";
	CREATE INDEX "studies_title_trigrams" ON "studies" USING gin (lower("title") gin_trgm_ops);
EXCEPTION WHEN insufficient_privilege OR undefined_file OR feature_not_supported OR undefined_object THEN
	RAISE NOTICE 'Titles are searched without trigrams.';
END
$$;
