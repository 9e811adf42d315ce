import type { BaseContext } from 'tone';

/**
 * Seconds from the audio clock to the ear, as the browser estimates them; 0 where it does not say. Tone wraps the browser's
 * context and does not pass `outputLatency` on, so it is asked for behind the wrapper.
 */
export function outputLatency(context: BaseContext): number {
  if (context.isOffline) return 0;
  const native: unknown = Reflect.get(context.rawContext, '_nativeContext') ?? context.rawContext;
  for (const name of ['outputLatency', 'baseLatency']) {
    const value: unknown = typeof native === 'object' && native !== null ? Reflect.get(native, name) : undefined;
    if (typeof value === 'number' && Number.isFinite(value) && value > 0) return value;
  }
  return 0;
}
