import 'server-only';
import { z } from 'zod';

const schema = z.object({
  NEXTAUTH_SECRET: z.string().min(32),
  NEXTAUTH_URL: z.url(),
});

let checked: z.infer<typeof schema> | undefined;

/**
 * The settings of signing in, checked at the first call, so that a build needs none.
 * @throws Error naming the settings that are missing or too short, never their values
 */
export function getEnv(): z.infer<typeof schema> {
  if (checked) return checked;
  const result = schema.safeParse(process.env);
  if (!result.success) {
    const names = result.error.issues.map((issue) => issue.path.join('.')).join(', ');
    throw new Error(`These settings are missing or too short: ${names}. Start Sesqui with npm start, which sets them.`);
  }
  checked = result.data;
  return checked;
}
