import { engraver, nextProgram, sourcesHash } from './build.mjs';
import { root } from './paths.mjs';
import { start } from './processes.mjs';
import { Stop } from './stop.mjs';

const SECONDS = 60;

async function isHealthy(url) {
  try {
    return (await fetch(`${url}/api/health`, { signal: AbortSignal.timeout(5_000) })).ok;
  } catch {
    return false;
  }
}

/**
 * Starts the web server on 127.0.0.1 and waits until it and its database answer.
 * @param command - `start` for the production build, `dev` for development
 * @param publicUrl - the address that readers use, where it is another
 * @returns `{ url, child }`
 */
export async function startWebServer({ command = 'start', port, databaseUrl, secret, publicUrl }) {
  const url = `http://127.0.0.1:${port}`;
  const env = {
    ...process.env,
    NODE_ENV: command === 'dev' ? 'development' : 'production',
    DATABASE_URL: databaseUrl,
    NEXTAUTH_SECRET: secret,
    NEXTAUTH_URL: publicUrl || url,
    NEXT_TELEMETRY_DISABLED: '1',
    SESQUI_ENGRAVER: engraver,
    SESQUI_RELEASE: sourcesHash(),
  };
  const child = start(process.execPath, [nextProgram, command, '-H', '127.0.0.1', '-p', String(port)], { cwd: root, env, stdio: ['ignore', 'pipe', 'pipe'] });
  let early = '';
  let isUp = false;
  const show = (stream) => (piece) => (isUp ? stream.write(piece) : (early += piece));
  child.stdout.on('data', show(process.stdout));
  child.stderr.on('data', show(process.stderr));
  for (const until = Date.now() + SECONDS * 1000; Date.now() < until && child.exitCode === null; ) {
    if (await isHealthy(url)) {
      isUp = true;
      return { url, child };
    }
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  if (early.includes('EADDRINUSE')) throw new Stop(`Port ${port} was taken by another program meanwhile: choose another, for example PORT=${port + 1} npm start.`);
  const said = early.trim().split('\n').slice(-10).join('\n');
  throw new Stop(`The web server did not come up within ${SECONDS} seconds; this is the last it said, for a bug report:\n${said}`);
}
