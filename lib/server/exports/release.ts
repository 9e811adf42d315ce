import 'server-only';
import { createHash } from 'node:crypto';

/** What made the files: another release may write them otherwise, so it stands in every tag and key. Set by `scripts/lib/web-server.mjs`. */
export const release = (): string => process.env.SESQUI_RELEASE ?? 'unnamed';

/** One hash of everything that a file is made from. */
export const keyOf = (...made: readonly unknown[]): string => createHash('sha256').update(JSON.stringify([release(), ...made])).digest('hex');
