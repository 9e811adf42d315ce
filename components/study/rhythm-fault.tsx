import { EngineError, type Metre, RhythmTextError, parseRhythm } from '@/engine';

/** What is wrong with a text: the sentence, and the piece that it marks. */
export type Fault = { readonly message: string; readonly offset: number; readonly length: number };

/** Reads a rhythm text. @returns what is wrong with it, null where nothing is */
export function faultOf(text: string, metre?: Metre): Fault | null {
  try {
    parseRhythm(text, metre === undefined ? {} : { metre });
    return null;
  } catch (error) {
    if (error instanceof RhythmTextError) return { message: error.message, offset: error.offset, length: error.length };
    if (error instanceof EngineError) return { message: error.message, offset: 0, length: text.length };
    throw error;
  }
}

/** The text with the offending piece marked. */
export function Marked({ text, fault }: { text: string; fault: Fault }) {
  const from = Math.max(0, fault.offset - 24);
  const to = Math.min(text.length, fault.offset + fault.length + 24);
  const end = Math.min(fault.offset + fault.length, fault.offset + 80);
  return (
    <code aria-hidden className="mb-1 block overflow-x-auto whitespace-pre font-mono text-[13px]">
      {from > 0 && '… '}
      {text.slice(from, fault.offset).replace(/\s+/g, ' ')}
      <mark className="bg-transparent font-bold text-mark underline decoration-wavy underline-offset-4">
        {text.slice(fault.offset, end) || '␣'}
      </mark>
      {text.slice(end, to).replace(/\s+/g, ' ')}
    </code>
  );
}
