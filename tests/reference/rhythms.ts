import { type Rhythm, attacks, formatRhythm, parseRhythm } from '@/engine';

/** A box pattern of attacks and silences, `x..x`, as a rhythm of one-pulse notes and rests. */
export const fromBox = (box: string, pulse = '1/8'): Rhythm =>
  parseRhythm([...box].map((pulseOf) => (pulseOf === 'x' ? pulse : `(${pulse})`)).join(' '));

/** The attacks of a rhythm on a pulse of `1/unit`, as a box pattern of so many pulses. */
export function toBox(rhythm: Rhythm, pulses: number, unit = 8): string {
  const at = new Set(attacks(rhythm).map((a) => a.mul(unit).toFraction()));
  return Array.from({ length: pulses }, (_, pulse) => (at.has(String(pulse)) ? 'x' : '.')).join('');
}

/** Integers as values of so many `1/unit`. */
export const inUnits = (values: string | readonly number[], unit: number): Rhythm =>
  parseRhythm((typeof values === 'string' ? values.split(' ') : values.map(String)).map((value) => `${divided(value, unit)}`).join(' '));

function divided(value: string, unit: number): string {
  const [n = '1', d = '1'] = value.split('/');
  return `${n}/${Number(d) * unit}`;
}

/** Whether the order of values is the same both ways. */
export const isPalindrome = (rhythm: Rhythm, reversed: Rhythm): boolean => formatRhythm(rhythm) === formatRhythm(reversed);
