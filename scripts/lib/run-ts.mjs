import path from 'node:path';
import { data, inRoot, root } from './paths.mjs';
import { run } from './processes.mjs';

/**
 * Puts a TypeScript file and what it imports from this clone into one plain file; packages stay outside.
 * @param entry - path from the clone's top folder
 * @returns the path of the plain file
 */
export async function compile(entry) {
  const { build } = await import('vite');
  const name = `${entry.replace(/\.\w+$/, '').replaceAll(/[^\w-]/g, '-')}.mjs`;
  const outDir = path.join(data, 'run');
  await build({
    configFile: false,
    root,
    logLevel: 'error',
    publicDir: false,
    resolve: { alias: { '@': root, 'server-only': inRoot('node_modules/server-only/empty.js') } },
    build: {
      ssr: inRoot(entry),
      outDir,
      emptyOutDir: false,
      minify: false,
      target: 'node20',
      rolldownOptions: { output: { entryFileNames: name, codeSplitting: false } },
    },
  });
  return path.join(outDir, name);
}

/**
 * Runs a TypeScript file in a Node process of its own.
 * @param options - as for `run`
 */
export async function runTs(entry, args = [], options = {}) {
  return run(process.execPath, ['--enable-source-maps', await compile(entry), ...args], { cwd: root, ...options });
}
