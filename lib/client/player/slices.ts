/** Milliseconds of work before the page gets its turn. */
const SLICE = 8;

/** Gives the page its turn; unlike a timer it is not slowed down in a background tab. */
export function breathe(): Promise<void> {
  return new Promise((resolve) => {
    const { port1, port2 } = new MessageChannel();
    port1.onmessage = () => {
      port1.close();
      resolve();
    };
    port2.postMessage(null);
  });
}

/** Runs stepwise work to its end in slices of a few milliseconds. */
export async function runInSlices<T>(steps: Generator<void, T, void>): Promise<T> {
  let until = performance.now() + SLICE;
  for (;;) {
    const { done, value } = steps.next();
    if (done) return value;
    if (performance.now() < until) continue;
    await breathe();
    until = performance.now() + SLICE;
  }
}
