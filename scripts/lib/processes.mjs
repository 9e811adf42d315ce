import { spawn } from 'node:child_process';
import { Stop } from './stop.mjs';

const children = new Set();
const cleanups = [];
let ending = false;

/**
 * Starts a program in a process group of its own, so that Ctrl-C reaches this script alone and it can end things in order.
 * @param options - as for `spawn`; standard input is closed
 */
export function start(command, args, options = {}) {
  const child = spawn(command, args, { stdio: ['ignore', 'inherit', 'inherit'], ...options, detached: true });
  children.add(child);
  child.once('close', () => children.delete(child));
  child.once('error', () => children.delete(child));
  return child;
}

/**
 * Runs a program to its end.
 * @param options - as for `spawn`; `quiet` keeps its output instead of showing it
 * @returns `{ code, output, stdout }`: all that was kept, and the standard output alone; `code` is 127 where the program is
 * not there, 1 where a signal ended it
 */
export function run(command, args, { quiet = false, ...options } = {}) {
  const begunAtEnd = ending;
  const child = start(command, args, quiet ? { ...options, stdio: ['ignore', 'pipe', 'pipe'] } : options);
  let output = '';
  let stdout = '';
  child.stdout?.on('data', (piece) => {
    output += piece;
    stdout += piece;
  });
  child.stderr?.on('data', (piece) => (output += piece));
  return new Promise((resolve) => {
    child.once('error', (error) => resolve({ code: 127, output: error.message, stdout }));
    child.once('close', (code) => {
      // What the end has cut off goes no further: its caller would take it for a failure and say so.
      if (ending === begunAtEnd) resolve({ code: code ?? 1, output, stdout });
    });
  });
}

const alive = (child) => child.exitCode === null && child.signalCode === null && child.pid !== undefined;

function signal(child, name) {
  try {
    process.kill(-child.pid, name);
  } catch {
    // it has ended meanwhile
  }
}

/** Ends a started program and everything it started: asks, waits five seconds, then insists. */
export async function endChild(child) {
  if (!alive(child)) return;
  const gone = new Promise((resolve) => child.once('exit', resolve));
  signal(child, 'SIGTERM');
  const insist = setTimeout(() => signal(child, 'SIGKILL'), 5_000);
  await gone;
  clearTimeout(insist);
  signal(child, 'SIGKILL');
}

/** Remembers what must be undone at the end; the last is undone first. */
export const atEnd = (undo) => cleanups.push(undo);

/** What went wrong, in a sentence; the trace of a fault of ours only where it is asked for. */
function explain(error) {
  if (error instanceof Stop) return error.message;
  if (process.env.SESQUI_TRACE) return error.stack ?? String(error);
  return `Something unexpected went wrong (${error.message ?? error}): set SESQUI_TRACE=1 and try again to see where.`;
}

/** Ends all that was started, undoes what must be undone, and leaves; `message` is shown unless the end has begun already. */
export async function end(code, message) {
  if (ending) return;
  ending = true;
  if (message) console.error(message);
  await Promise.all([...children].map(endChild));
  for (const undo of cleanups.reverse()) {
    try {
      await undo();
    } catch (error) {
      console.error(explain(error));
      code ||= 1;
    }
  }
  process.exit(code);
}

/** npm passes a signal on to the shell it runs scripts in, and that shell to nobody: its end is the signal then. */
function endWithShell(code) {
  if (!process.env.npm_lifecycle_event) return;
  const shell = process.ppid;
  setInterval(() => process.ppid !== shell && void end(code), 500).unref();
}

/**
 * Runs a script's main function: a `Stop` is shown as its sentence, a signal ends everything in order.
 * @param interrupted - exit code after a signal
 */
export async function main(work, { interrupted = 0 } = {}) {
  // A terminal that is gone takes no more words; that must not keep the rest from being ended.
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => undefined);
  for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(name, () => void end(interrupted));
  endWithShell(interrupted);
  try {
    const code = await work();
    if (code !== undefined) await end(code);
  } catch (error) {
    await end(1, `\n${explain(error)}`);
  }
}
