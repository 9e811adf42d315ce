export type PlayerStatus = 'stopped' | 'preparing' | 'playing' | 'paused';

/** What a page shows of the player; the place is asked for apart, by `position()`. */
export type PlayerState = {
  readonly status: PlayerStatus;
  /** 1 as written */
  readonly speed: number;
  /** decibels, 0 the loudest */
  readonly volume: number;
  /** instruments heard alone; none means all */
  readonly solo: readonly string[];
  readonly muted: readonly string[];
  readonly loop: boolean;
  /** sounds made of those missing, while they are being made */
  readonly preparing: { readonly done: number; readonly total: number } | null;
  /** milliseconds that making the missing sounds took, the last time some were missing */
  readonly prepareMilliseconds: number | null;
  /** strokes left out since the last start because the page was busy for too long */
  readonly missed: number;
  /** why there is no sound, in words, or null */
  readonly problem: string | null;
};

/** Keeps one state and tells who subscribed when it changes; made for React's `useSyncExternalStore`, without React. */
export class Store<State> {
  private readonly listeners = new Set<() => void>();

  constructor(private state: State) {}

  readonly get = (): State => this.state;

  /** @returns ends the subscription */
  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  set(change: Partial<State>): void {
    this.state = { ...this.state, ...change };
    for (const listener of [...this.listeners]) listener();
  }
}
