import type pg from 'pg';

const KEPT = `
  select jsonb_build_object(
    'person', (select to_jsonb(u) from users u where u.id = $1),
    'studies', (select jsonb_agg(to_jsonb(s) order by s.id) from studies s where s.owner_id = $1 or s.is_demo),
    'versions', (select jsonb_agg(to_jsonb(v) order by v.study_id, v.version)
      from study_versions v join studies s on s.id = v.study_id where s.owner_id = $1 or s.is_demo),
    'prints', (select jsonb_agg(j.id order by j.id) from export_jobs j where j.owner_id = $1)
  ) as rows`;

/** Every row that an account has, and the demo studies, as they stand in the database; of prints, which there are. */
export async function rowsOf(pool: pg.Pool, userId: string): Promise<unknown> {
  const { rows } = await pool.query<{ rows: unknown }>(KEPT, [userId]);
  return rows[0]?.rows;
}
