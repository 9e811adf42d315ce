import {
  EngineError,
  type FreeSection,
  type Entries,
  type Instrument,
  LIMITS,
  type Process,
  type ProcessKind,
  type ProcessSection,
  type ProportionProcess,
  type Reading,
  type Section,
  type Study,
  type StudyInput,
  type Writing,
  formatFraction,
  parseRhythm,
  proportionFactors,
  rulesOf,
  isFactor,
  toFactor,
  toFraction,
} from '@/engine';

/** A change of a study: what it was in, what it becomes out. Whether that can be built is for the editor to find out. */
export type Edit = (study: Study) => StudyInput;

export const setTitle = (title: string): Edit => (study) => ({ ...study, title });
export const setMetre = (metre: string): Edit => (study) => ({ ...study, metre: metre.replace(/\s+/g, '') });
export const setTempo = (beat: string, perMinute: string): Edit => (study) => ({ ...study, tempo: { beat, perMinute } });

const mapSection =
  (id: string, change: (section: Section) => Section): Edit =>
  (study) => ({ ...study, sections: study.sections.map((section) => (section.id === id ? change(section) : section)) });

const mapProcess = (id: string, change: (section: ProcessSection) => ProcessSection): Edit =>
  mapSection(id, (section) => (section.kind === 'process' ? change(section) : section));

const mapProportion = (id: string, change: (process: ProportionProcess) => ProportionProcess): Edit =>
  mapProcess(id, (section) => (section.process.kind === 'proportion' ? { ...section, process: change(section.process) } : section));

/** Factors from a list separated by commas or spaces between them; `1 1/2` with a comma about it stays one number. */
export const splitFactors = (text: string): string[] => (/[,;]/.test(text) ? text.split(/[,;]/) : text.split(/\s+/)).map((one) => one.trim()).filter((one) => one !== '');

export const setFactors = (id: string, texts: readonly string[]): Edit => {
  if (texts.length === 0) throw new EngineError('invalid_factor', 'No factor is written here. Write one for each statement, such as 1, 5/4, 3/2.');
  const factors = texts.map((text) => formatFraction(toFactor(text)));
  return mapProportion(id, ({ ratio: _ratio, count: _count, ...process }) => ({ ...process, factors }));
};

export const setRatio = (id: string, ratio: string): Edit => {
  const read = formatFraction(toFactor(ratio));
  return mapProportion(id, ({ factors: _factors, ...process }) => ({
    ...process,
    ratio: read,
    count: proportionFactors({ ..._factors ? { factors: _factors } : {}, ...process }).length,
  }));
};

/** More statements go on by the last step; fewer leave the last ones out. */
export const setCount = (id: string, count: number): Edit => {
  if (!Number.isInteger(count) || count < 1 || count > LIMITS.statements) {
    throw new EngineError('too_large', `A section can have from 1 to ${LIMITS.statements} statements.`);
  }
  return mapProportion(id, (process) => {
    if (process.factors === undefined) return { ...process, count };
    const factors = proportionFactors(process);
    const last = factors.at(-1)!;
    const step = factors.length > 1 ? last.div(factors.at(-2)!) : toFraction(1);
    let next = last;
    while (factors.length < count) {
      next = next.mul(step);
      if (!isFactor(next)) throw new EngineError('invalid_factor', `Going on by ${formatFraction(step)}, statement ${factors.length + 1} would be out of reach. Write the factors instead.`);
      factors.push(next);
    }
    return { ...process, factors: factors.slice(0, count).map(formatFraction) };
  });
};

/** Puts fields of a section's process in place, whatever process it is; what does not fit it is refused when it is built. */
export const setProcessFields = (id: string, fields: Readonly<Record<string, unknown>>): Edit =>
  mapProcess(id, (section) => ({ ...section, process: { ...section.process, ...fields } as Process }));

export const setEntries = (id: string, entries: Entries): Edit => setProcessFields(id, { entries });

/**
 * Another process on the same subject, as it is begun; entries and reading go with it where it has them, and so many
 * instruments as it asks for.
 */
export const setProcessKind = (id: string, kind: ProcessKind): Edit => (study) => {
  const section = study.sections.find((one) => one.id === id);
  if (section?.kind !== 'process' || section.process.kind === kind) return study;
  const rules = rulesOf({ kind });
  const others = study.instruments.map((one) => one.id).filter((one) => !section.instruments.includes(one));
  const instruments = rules.players === undefined ? section.instruments : [...section.instruments, ...others].slice(0, rules.players);
  const subjects = study.subjects.find((one) => one.id === section.subject) ?? study.subjects[0];
  const begun = rules.begin(subjects ? parseRhythm(subjects.rhythm) : [], instruments);
  const { reading, entries } = section.process as { reading?: Reading; entries?: Entries };
  const kept = Object.fromEntries(Object.entries({ reading, entries }).filter(([field, value]) => value !== undefined && field in begun));
  const process = { ...begun, ...kept } as Process;
  return mapProcess(id, (one) => ({ ...one, process, instruments, ...(rules.takesSubject && subjects ? { subject: subjects.id } : {}) }))(study);
};

/** How a stretch is written in a section. */
export const setWriting = (id: string, writing: Writing): Edit => mapSection(id, (section) => ({ ...section, writing }));

/** What is done to the subject before the process. */
export const setBefore = (id: string, before: ProcessSection['before']): Edit =>
  mapProcess(id, ({ before: _, ...section }) => (before?.length ? { ...section, before } : section));

export const setReadings = (id: string, readings: readonly Reading[]): Edit =>
  mapProportion(id, ({ readings: _readings, reading: _reading, ...process }) =>
    readings.length === 1 ? { ...process, reading: readings[0]! } : { ...process, readings: [...readings] },
  );

export const setRotations = (id: string, text: string): Edit => {
  const turns = splitFactors(text).map(Number);
  if (turns.some((turn) => !Number.isInteger(turn))) {
    throw new EngineError('invalid_argument', 'A rotation goes by whole values. Write whole numbers, such as 0, 2, 4.');
  }
  return mapProportion(id, ({ rotations: _rotations, ...process }) => (turns.length === 0 ? process : { ...process, rotations: turns }));
};

export const setSectionSubject = (id: string, subject: string): Edit => mapProcess(id, (section) => ({ ...section, subject }));
export const setSectionInstruments = (id: string, instruments: readonly string[]): Edit =>
  mapSection(id, (section) => {
    if (section.kind === 'process') return { ...section, instruments: [...instruments] };
    if (section.kind === 'free') {
      return { ...section, lines: section.lines.map((line, index) => ({ ...line, instrument: instruments[index] ?? line.instrument })) };
    }
    return section;
  });

export const setMirror = (id: string, change: { of?: string; by?: 'values' | 'attacks' }): Edit =>
  mapSection(id, (section) => (section.kind === 'mirror' ? { ...section, ...change } : section));

export const renameSection = (id: string, name: string): Edit => mapSection(id, (section) => ({ ...section, name }));
export const setRole = (id: string, role: Section['role']): Edit => mapSection(id, (section) => ({ ...section, role }));

export const setLines = (id: string, lines: FreeSection['lines']): Edit =>
  mapSection(id, (section) => (section.kind === 'free' ? { ...section, lines: [...lines] } : section));

export const setSubject = (id: string, change: { name?: string; rhythm?: string }): Edit => (study) => ({
  ...study,
  subjects: study.subjects.map((subject) => (subject.id === id ? { ...subject, ...change } : subject)),
});

/** An id made of a name that is not taken yet. */
export function freshId(name: string, taken: readonly { id: string }[]): string {
  const base = name.toLowerCase().normalize('NFKD').replace(/[^a-z0-9]+/g, '-').replace(/^-|-$/g, '').slice(0, 40) || 'item';
  const ids = new Set(taken.map(({ id }) => id));
  for (let n = 1; ; n += 1) {
    const id = n === 1 ? base : `${base}-${n}`;
    if (!ids.has(id)) return id;
  }
}

export const addSection = (kind: Section['kind'], after: string): Edit => (study) => {
  const index = study.sections.findIndex(({ id }) => id === after);
  const source = study.sections[index]!;
  const name = { process: 'New section', free: 'New episode', mirror: `${source.name}, reversed` }[kind].slice(0, LIMITS.name);
  const common = { id: freshId(name, study.sections), name };
  const subject = study.subjects[0];
  const first = study.instruments[0];
  const section: Section =
    kind === 'mirror'
      ? { ...common, role: 'recapitulation', kind, of: source.id }
      : kind === 'free'
        ? { ...common, role: 'episode', kind, lines: first ? [{ instrument: first.id, rhythm: '1/4 1/4 1/4 1/4' }] : [] }
        : {
            ...common,
            role: 'development',
            kind,
            ...(subject ? { subject: subject.id } : {}),
            process: { kind: 'proportion', factors: ['1'], reading: 'forwards', entries: 'successive' },
            instruments: study.instruments.slice(0, 1).map(({ id }) => id),
          };
  return { ...study, sections: study.sections.toSpliced(index + 1, 0, section) };
};

export const removeSection = (id: string): Edit => (study) => {
  const mirror = study.sections.find((section) => section.kind === 'mirror' && section.of === id);
  const name = study.sections.find((section) => section.id === id)?.name;
  if (mirror) throw new EngineError('unknown_section', `“${mirror.name}” mirrors “${name}”. Let it mirror another section first, or remove it.`);
  if (study.sections.length === 1) throw new EngineError('invalid_document', 'A study has at least one section.');
  return { ...study, sections: study.sections.filter((section) => section.id !== id) };
};

export const moveSection = (id: string, by: -1 | 1): Edit => (study) => {
  const index = study.sections.findIndex((section) => section.id === id);
  const to = index + by;
  if (to < 0 || to >= study.sections.length) return study;
  const sections = [...study.sections];
  [sections[index], sections[to]] = [sections[to]!, sections[index]!];
  return { ...study, sections };
};

export const addInstrument = (name: string, family: Instrument['family'], sound: string): Edit => (study) => ({
  ...study,
  instruments: [...study.instruments, { id: freshId(name, study.instruments), name, family, sound }],
});

export const changeInstrument = (id: string, change: Partial<Omit<Instrument, 'id'>>): Edit => (study) => ({
  ...study,
  instruments: study.instruments.map((one) => (one.id === id ? { ...one, ...change } : one)),
});

/** The sections in which an instrument plays, by name. */
export const sectionsWith = (study: Study, instrument: string): string[] =>
  study.sections
    .filter((section) => {
      const own = section.kind === 'process' ? section.instruments : section.kind === 'free' ? section.lines.map((line) => line.instrument) : [];
      return [...own, ...(section.under ?? []).map((line) => line.instrument)].includes(instrument);
    })
    .map(({ name }) => name);

export const removeInstrument = (id: string): Edit => (study) => {
  const used = sectionsWith(study, id);
  const name = study.instruments.find((one) => one.id === id)?.name ?? id;
  if (used.length > 0) {
    throw new EngineError('unknown_instrument', `${name} plays in ${used.map((one) => `“${one}”`).join(', ')}. Let another instrument play there first.`);
  }
  return {
    ...study,
    instruments: study.instruments.filter((one) => one.id !== id),
    players: study.players.map((player) => ({ ...player, instruments: player.instruments.filter((one) => one !== id) })),
  };
};

export const moveInstrument = (id: string, by: -1 | 1): Edit => (study) => {
  const index = study.instruments.findIndex((one) => one.id === id);
  const to = index + by;
  if (to < 0 || to >= study.instruments.length) return study;
  const instruments = [...study.instruments];
  [instruments[index], instruments[to]] = [instruments[to]!, instruments[index]!];
  return { ...study, instruments };
};
