import { EngineError, type FreeSection, LIMITS, type Section, type Study } from '@/engine';
import { type Edit, freshId } from './study-edits';

export type Marks = NonNullable<Study['subjects'][number]['marks']>;

/** The field with what was typed, or without it where nothing was. */
function orNone<T extends object, K extends keyof T>(item: T, field: K, value: T[K] | undefined): T {
  const rest = Object.fromEntries(Object.entries(item).filter(([key]) => key !== field));
  const isEmpty = value === undefined || (typeof value === 'string' && value.trim() === '') || (Array.isArray(value) && value.length === 0);
  return (isEmpty ? rest : { ...rest, [field]: value }) as T;
}

export const setComposer = (composer: string): Edit => (study) => orNone(study, 'composer', composer.trim());
/** The composer's own line about their rights. */
export const setRights = (rights: string): Edit => (study) => orNone(study, 'rights', rights.trim());

const inOrder = (study: Study, ids: readonly string[]): string[] => study.instruments.map(({ id }) => id).filter((id) => ids.includes(id));

export const addPlayer = (name: string): Edit => (study) => {
  const words = name.trim();
  if (words === '') throw new EngineError('invalid_document', 'Give the player a name, such as Player 1.');
  if (study.players.length >= LIMITS.players) throw new EngineError('too_large', `A study may have ${LIMITS.players} players.`);
  return { ...study, players: [...study.players, { id: freshId(words, study.players), name: words, instruments: [] }] };
};

export const renamePlayer = (id: string, name: string): Edit => (study) => ({ ...study, players: study.players.map((player) => (player.id === id ? { ...player, name } : player)) });

export const removePlayer = (id: string): Edit => (study) => ({ ...study, players: study.players.filter((player) => player.id !== id) });

export const movePlayer = (id: string, by: -1 | 1): Edit => (study) => {
  const from = study.players.findIndex((player) => player.id === id);
  const to = from + by;
  if (to < 0 || to >= study.players.length) return study;
  return { ...study, players: study.players.toSpliced(from, 1).toSpliced(to, 0, study.players[from]!) };
};

/** Which instruments a player plays, in the order of the score. */
export const setPlays = (id: string, instrument: string, plays: boolean): Edit => (study) => ({
  ...study,
  players: study.players.map((player) =>
    player.id === id ? { ...player, instruments: inOrder(study, plays ? [...player.instruments, instrument] : player.instruments.filter((one) => one !== instrument)) } : player,
  ),
});

/** A player for each instrument that nobody plays yet. */
export const playersForAll = (): Edit => (study) => {
  const free = study.instruments.filter(({ id }) => !study.players.some((player) => player.instruments.includes(id)));
  return free.reduce<ReturnType<Edit>>((made, { id }) => {
    const players = made.players ?? [];
    const name = `Player ${players.length + 1}`;
    return { ...made, players: [...players, { id: freshId(name, players), name, instruments: [id] }] };
  }, study);
};

const mapSection =
  (id: string, change: (section: Section) => Section): Edit =>
  (study) => ({ ...study, sections: study.sections.map((section) => (section.id === id ? change(section) : section)) });

export const setDynamics = (id: string, text: string): Edit => mapSection(id, (section) => orNone(section, 'dynamics', text.trim()));

/** One plan a statement, separated by semicolons, repeated in turn. */
export const setStatementDynamics = (id: string, text: string): Edit =>
  mapSection(id, (section) => {
    if (section.kind !== 'process') return section;
    const plans = text.split(';').map((one) => one.trim());
    return orNone(section, 'statementDynamics', plans.some((one) => one !== '') ? plans : undefined);
  });

export const setFermata = (id: string, isHeld: boolean): Edit => mapSection(id, (section) => orNone(section, 'fermata', isHeld ? true : undefined));

const mapLine = (id: string, index: number, change: (line: FreeSection['lines'][number]) => FreeSection['lines'][number]): Edit =>
  mapSection(id, (section) => (section.kind === 'free' ? { ...section, lines: section.lines.map((line, n) => (n === index ? change(line) : line)) } : section));

export const setLineDynamics = (id: string, index: number, text: string): Edit => mapLine(id, index, (line) => orNone(line, 'dynamics', text.trim()));

/** How an attack ends; null for as it is written. */
export function withMark(marks: Marks | undefined, attack: number, ends: Marks[number]['ends'] | null): Marks {
  const others = (marks ?? []).filter((mark) => mark.attack !== attack);
  return ends === null ? others : [...others, { attack, ends }].sort((a, b) => a.attack - b.attack);
}

export const setLineMarks = (id: string, index: number, marks: Marks): Edit => mapLine(id, index, (line) => orNone(line, 'marks', marks));

export const setSubjectMarks = (id: string, marks: Marks): Edit => (study) => ({ ...study, subjects: study.subjects.map((subject) => (subject.id === id ? orNone(subject, 'marks', marks) : subject)) });
