import type { CSSProperties } from 'react';
import type { Instrument, Statement, Study } from '@/engine';

/** A family's texture, as a class; the colour is set by `tint`. */
export const TEXTURES: Record<Instrument['family'], string> = {
  metal: 'texture-metal',
  wood: 'texture-wood',
  skin: 'texture-skin',
  found: 'texture-found',
};

export const FAMILY_WORDS: Record<Instrument['family'], string> = { metal: 'metal', wood: 'wood', skin: 'skin', found: 'found object' };

/** An instrument's colour: its family's, deeper for each further member of the family. */
export function tint(study: Study, id: string | null): string {
  const instrument = study.instruments.find((one) => one.id === id);
  if (!instrument) return 'var(--soft)';
  const members = study.instruments.filter((one) => one.family === instrument.family);
  const depth = Math.min(members.indexOf(instrument), 3) * 14;
  return depth === 0 ? `var(--${instrument.family})` : `color-mix(in oklab, var(--${instrument.family}), var(--deepen) ${depth}%)`;
}

export const tintStyle = (study: Study, id: string | null): CSSProperties => ({ '--c': tint(study, id) }) as CSSProperties;
export const textureOf = (study: Study, id: string | null): string =>
  TEXTURES[study.instruments.find((one) => one.id === id)?.family ?? 'metal'];

/** Whoever plays a statement, alone or in turn, each once. */
export const instrumentsOf = ({ instrument, assigned }: Pick<Statement, 'instrument' | 'assigned'>): readonly (string | null)[] =>
  assigned === undefined ? [instrument] : [...new Set(assigned)];

/** The first of their names, and how many more. */
export function playersOf(study: Study, statement: Pick<Statement, 'instrument' | 'assigned'>): string {
  const names = instrumentsOf(statement).map((id) => study.instruments.find((one) => one.id === id)?.name ?? '');
  return names.length < 2 ? names.join('') : `${names[0]} + ${names.length - 1}`;
}
