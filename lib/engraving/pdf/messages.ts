import type { Study } from '@/engine';
import type { MusicKind } from '../../music-files';
import type { PageOptions } from '../page-options';

/** What is asked for: the score, one player's part, or every part in a zip. */
export type PrintRequest = {
  readonly study: Study;
  readonly what: 'score' | 'part' | 'parts';
  /** a print, or one of the files that the engine writes by itself */
  readonly as: 'pdf' | MusicKind;
  /** id of the player whose part it is */
  readonly player?: string | undefined;
  /** of a print */
  readonly options?: PageOptions | undefined;
  /** when the music was saved */
  readonly madeAt: Date;
};

export type PrintedFile = { readonly bytes: Uint8Array; readonly type: string; readonly name: string };

/** What the process that prints says to the one that asked. */
export type PrintMessage =
  | { readonly kind: 'ready' }
  /** pages, or of several parts the parts, that are made, and how many there will be */
  | { readonly kind: 'progress'; readonly done: number; readonly total: number }
  | { readonly kind: 'done'; readonly file: PrintedFile; readonly total: number }
  /** it cannot be printed, and why */
  | { readonly kind: 'refused'; readonly code: string; readonly message: string }
  /** a fault of ours */
  | { readonly kind: 'fault'; readonly message: string };
