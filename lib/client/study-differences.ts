import { type FreeSection, type Study, type ValueNames, clockOf, buildStudy, describeSection, formatClock, tempoWords } from '@/engine';

/** Something that differs between two versions of a study, in words. */
export type Difference = { readonly what: string; readonly mine: string; readonly theirs: string };

const NOTHING = 'not there';

const MARKS = { 'let-ring': 'rings on', choke: 'is stopped short' } as const;
const marksWords = (marks: Study['subjects'][number]['marks']): string => (marks ?? []).map(({ attack, ends }) => `; attack ${attack + 1} ${MARKS[ends]}`).join('');
const lineWords = ({ instrument, rhythm, marks, dynamics }: FreeSection['lines'][number]): string => `${instrument}: ${rhythm}${marksWords(marks)}${dynamics ? `; ${dynamics}` : ''}`;

function sectionWords(study: Study, id: string, valueNames: ValueNames): string {
  const section = study.sections.find((one) => one.id === id);
  if (!section) return NOTHING;
  const lines = section.kind === 'free' ? section.lines.map(lineWords) : [];
  const under = (section.under ?? []).map((line) => `Under it, ${lineWords(line)}`);
  const plans = section.kind === 'process' && section.statementDynamics ? [`Its statements are ${section.statementDynamics.join('; ')}.`] : [];
  const said = [...(section.dynamics ? [`It is ${section.dynamics}.`] : []), ...plans, ...(section.fermata ? ['Its end is held.'] : [])];
  return [`${section.name}: ${describeSection(study, id, { valueNames })}`, ...lines, ...under, ...said].join(' ');
}

function byId<T extends { id: string }>(mine: readonly T[], theirs: readonly T[], what: (item: T) => string, words: (item: T) => string): Difference[] {
  const ids = [...new Set([...mine, ...theirs].map(({ id }) => id))];
  return ids.flatMap((id) => {
    const [a, b] = [mine.find((one) => one.id === id), theirs.find((one) => one.id === id)];
    const [own, other] = [a ? words(a) : NOTHING, b ? words(b) : NOTHING];
    return own === other ? [] : [{ what: what((a ?? b)!), mine: own, theirs: other }];
  });
}

const order = (items: readonly { id: string; name: string }[]): string => items.map(({ name }) => name).join(', ');
const length = (study: Study): string => formatClock(clockOf(study, buildStudy(study)).total);

/** What differs between two versions of a study, in the order in which a reader would ask. */
export function differencesOf(mine: Study, theirs: Study, valueNames: ValueNames = 'american'): Difference[] {
  const simple = (what: string, words: (study: Study) => string): Difference[] =>
    words(mine) === words(theirs) ? [] : [{ what, mine: words(mine), theirs: words(theirs) }];
  const sections = [...new Set([...mine.sections, ...theirs.sections].map(({ id }) => id))].flatMap((id) => {
    const [own, other] = [sectionWords(mine, id, valueNames), sectionWords(theirs, id, valueNames)];
    const name = [...mine.sections, ...theirs.sections].find((one) => one.id === id)!.name;
    return own === other ? [] : [{ what: `Section “${name}”`, mine: own, theirs: other }];
  });
  const found = [
    ...simple('Title', ({ title }) => title),
    ...simple('Composer', ({ composer }) => composer ?? NOTHING),
    ...simple('Rights', ({ rights }) => rights ?? NOTHING),
    ...simple('Metre', ({ metre }) => metre),
    ...simple('Tempo', ({ tempo }) => tempoWords(tempo, { valueNames })),
    ...byId(mine.subjects, theirs.subjects, ({ name }) => `Subject “${name}”`, ({ name, rhythm, marks }) => `${name}: ${rhythm}${marksWords(marks)}`),
    ...sections,
    ...simple('Order of sections', (study) => order(study.sections)),
    ...byId(mine.instruments, theirs.instruments, ({ name }) => `Instrument “${name}”`, ({ name, family, sound, sounds }) => `${name}, ${family}, sounds as ${sound ?? family}, ${sounds ?? 1}`),
    ...simple('Order of instruments', (study) => order(study.instruments)),
    ...byId(mine.players, theirs.players, ({ name }) => `Player “${name}”`, ({ name, instruments }) => `${name}: ${instruments.join(', ')}`),
    ...simple('Length', length),
  ];
  if (found.length > 0 || JSON.stringify(mine) === JSON.stringify(theirs)) return found;
  return [{ what: 'Details', mine: 'as you left them', theirs: 'as they were saved' }];
}
