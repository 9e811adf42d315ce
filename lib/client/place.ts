import type { Clock } from '@/engine';

/** Where the sound is. Pixels and the audio clock are floating point; everything before them is exact. */
export class Place {
  private spans: { start: number; seconds: number; whole: number }[] = [];
  private total = 0;
  private readonly watchers = new Set<(position: number | null) => void>();
  private frame: number | null = null;
  private last: number | null = null;

  /** @param read - the place of the sound in seconds of the written tempo, null while nothing has been started */
  constructor(private readonly read: () => { seconds: number; isMoving: boolean } | null) {}

  setClock(clock: Clock): void {
    this.spans = clock.spans.map(({ start, seconds, secondsOfWhole }) => ({
      start: start.valueOf(),
      seconds: seconds.valueOf(),
      whole: secondsOfWhole.valueOf(),
    }));
    this.total = clock.total.valueOf();
    this.wake();
  }

  /** Seconds to whole notes. */
  positionAt(seconds: number): number {
    const span = this.spans.findLast((one) => one.seconds <= seconds) ?? this.spans[0];
    return span === undefined ? 0 : span.start + (seconds - span.seconds) / span.whole;
  }

  /** Whole notes to seconds. */
  secondsAt(position: number): number {
    const span = this.spans.findLast((one) => one.start <= position) ?? this.spans[0];
    return span === undefined ? 0 : span.seconds + (position - span.start) * span.whole;
  }

  /** Calls back with the place in whole notes, on every frame while it moves, and once whenever it is set. */
  watch(watcher: (position: number | null) => void): () => void {
    this.watchers.add(watcher);
    watcher(this.last);
    return () => this.watchers.delete(watcher);
  }

  /** To be called when the sound starts, stops or is moved. */
  wake(): void {
    if (this.frame !== null || typeof requestAnimationFrame === 'undefined') return;
    this.frame = requestAnimationFrame(this.step);
  }

  private readonly step = (): void => {
    this.frame = null;
    const now = this.read();
    this.last = now === null ? null : this.positionAt(Math.min(now.seconds, this.total));
    for (const watcher of this.watchers) watcher(this.last);
    if (now?.isMoving) this.wake();
  };
}
