import fs from 'node:fs';
import path from 'node:path';
import { hashOf, readText } from './files.mjs';
import { data, inRoot, root } from './paths.mjs';
import { run } from './processes.mjs';
import { compile } from './run-ts.mjs';

const stamp = inRoot('.next/sesqui-stamp');
const SOURCES = [
  'app', 'components', 'engine', 'db', 'lib', 'public', 'proxy.ts', 'instrumentation.ts', 'next.config.mjs', 'postcss.config.mjs', 'tailwind.config.ts',
  'tsconfig.json', 'package.json', 'package-lock.json',
];

export const nextProgram = inRoot('node_modules/next/dist/bin/next');

/** The program that prints, which the web server starts beside itself. */
export const engraver = path.join(data, 'run', 'lib-engraving-pdf-child.mjs');
/** Puts that program into one plain file. */
export const buildEngraver = () => compile('lib/engraving/pdf/child.ts');

/** A hash of everything that the production build is made from. */
export const sourcesHash = () => `${hashOf(root, SOURCES)} node ${process.versions.node.split('.')[0]}`;

/** Whether the production build was made from these very sources. */
export const isBuilt = () => readText(stamp) === sourcesHash() && fs.existsSync(inRoot('.next/BUILD_ID')) && fs.existsSync(engraver);

/**
 * Makes the production build where the sources have changed since the last.
 * @returns `{ code, output }` of the build; code 0 where there was nothing to do
 */
export async function ensureBuild() {
  if (isBuilt()) return { code: 0, output: 'The build is that of these sources already.' };
  const hash = sourcesHash();
  fs.rmSync(stamp, { force: true });
  const env = { ...process.env, NEXT_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' };
  const result = await run(process.execPath, [nextProgram, 'build'], { cwd: root, env, quiet: true });
  if (result.code === 0) {
    await buildEngraver();
    fs.writeFileSync(stamp, hash);
  }
  return result;
}
