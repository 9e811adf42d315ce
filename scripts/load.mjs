import http from 'node:http';
import { main } from './lib/processes.mjs';

/**
 * Asks the open API so many times a second and tells how long answers take: node scripts/load.mjs [address] [a second] [seconds].
 * Start Sesqui with SESQUI_OPEN_RATE=1000000 first; with the limit as shipped, the excess is answered by 429.
 */
const QUESTIONS = [
  ['/api/transform', { rhythm: '3/8 1/8 1/4 (1/4) 1/8 1/8 1/4 3/8 1/8 1/2', steps: [{ kind: 'augment', factor: '5/4' }, { kind: 'retrograde', by: 'values' }] }],
  ['/api/check', { subject: '3/8 1/8 1/4 (1/4) 1/8 1/8 1/4 1/2', steps: [{ kind: 'augment', factor: '3/2' }], answer: '9/16 3/16 3/8 (1/4) 3/16 3/16 3/8 3/4', metre: '4/4' }],
  ['/api/find', { from: '3/8 1/8 1/4 1/4', to: '1/2 1/2 1/4 3/4' }],
  ['/api/proportions/lengths', { lengths: ['4', '6', '8', '12'], claim: '3/2' }],
  ['/api/proportions/canon', { length: '60', speeds: ['3', '4', '5'] }],
];

await main(async () => {
  const [address = 'http://127.0.0.1:3000', rate = '200', lasts = '60'] = process.argv.slice(2);
  const agent = new http.Agent({ keepAlive: true, maxSockets: 256 });
  const times = [];
  const statuses = new Map();
  const count = (status) => statuses.set(status, (statuses.get(status) ?? 0) + 1);
  const ask = (n) =>
    new Promise((resolve) => {
      const [path, body] = QUESTIONS[n % QUESTIONS.length];
      const started = performance.now();
      const request = http.request(new URL(path, address), { method: 'POST', agent, headers: { 'content-type': 'application/json' } }, (response) => {
        response.resume();
        response.on('end', () => {
          times.push(performance.now() - started);
          count(response.statusCode);
          resolve();
        });
      });
      request.on('error', (error) => {
        count(error.code ?? 'error');
        resolve();
      });
      request.end(JSON.stringify(body));
    });
  const total = Number(rate) * Number(lasts);
  const started = performance.now();
  const asked = [];
  for (let n = 0; n < total; n += 1) {
    const due = started + (n * 1000) / Number(rate);
    const wait = due - performance.now();
    if (wait > 1) await new Promise((resolve) => setTimeout(resolve, wait));
    asked.push(ask(n));
  }
  await Promise.all(asked);
  times.sort((a, b) => a - b);
  const at = (share) => times[Math.min(times.length - 1, Math.floor(share * times.length))]?.toFixed(1);
  console.log(`${total} questions, ${rate} a second for ${lasts} s; answers: ${[...statuses].map(([status, n]) => `${status} × ${n}`).join(', ')}`);
  console.log(`milliseconds: median ${at(0.5)}, p95 ${at(0.95)}, p99 ${at(0.99)}, most ${times.at(-1)?.toFixed(1)}`);
  return 0;
});
