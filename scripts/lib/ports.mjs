import net from 'node:net';
import { Stop } from './stop.mjs';

/** Tries to listen on a port of 127.0.0.1. @returns the port, or the error's code where it cannot be had */
function tryPort(port) {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', (error) => resolve(error.code ?? 'EADDRINUSE'));
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => {
      const got = server.address().port;
      server.close(() => resolve(got));
    });
  });
}

export const isFree = async (port) => (await tryPort(port)) === port;

/** The preferred port where it is free, else one that the system picks. */
export async function freePort(preferred = 0) {
  const got = await tryPort(preferred);
  if (typeof got === 'number') return got;
  const other = await tryPort(0);
  if (typeof other === 'number') return other;
  throw new Stop(`No port can be opened on 127.0.0.1 (${other}): check that the loopback interface is up.`);
}

/**
 * The port that `PORT` asks for, 3000 where it says nothing.
 * @throws Stop where it is no port, or where another program has it
 */
export async function webPort(text = process.env.PORT) {
  const port = text === undefined || text === '' ? 3000 : Number(text);
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new Stop(`PORT is “${text}”, which is no port: give a whole number from 1 to 65535.`);
  }
  const got = await tryPort(port);
  if (got === 'EACCES') throw new Stop(`This account may not open port ${port}: choose one from 1024 up, for example PORT=3001 npm start.`);
  if (got !== port) throw new Stop(`Port ${port} is in use by another program: end that program, or choose another port, for example PORT=${port + 1} npm start.`);
  return port;
}

/** Whether something answers at a port of 127.0.0.1. */
export function answers(port) {
  return new Promise((resolve) => {
    const socket = net.connect({ port, host: '127.0.0.1' });
    socket.once('connect', () => resolve(true)).once('error', () => resolve(false)).setTimeout(2_000, () => resolve(false));
    socket.once('connect', () => socket.destroy()).once('timeout', () => socket.destroy());
  });
}
