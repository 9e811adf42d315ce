import {
  Fraction, type Rhythm, type StudyInput,
  augment, buildStudy, parseRhythm, parseStudy, spellLine,
} from '@/engine';
import { type Sized, medianOf, report } from './measure';
import { METRE, doubles, placePlain } from './plain-numbers';

const SIZES = [1_000, 10_000, 100_000];
const FACTORS = ['1', '5/4', '3/2', '2'];
const SUBJECT = '3/8 1/8 1/4 (1/4) 1/8 1/8 1/4 3/8 1/8 1/2 (1/4) 1/4 1/4 1/4 1/2';
const INSTRUMENTS = ['crotales', 'temple-blocks', 'log-drum', 'tam-tam'];

const subject = parseRhythm(SUBJECT);
const attacksIn = (rhythm: Rhythm): number => rhythm.filter(({ rest }) => !rest).length;

/** The subject again and again, its factor cycling: spelled measures recur. */
function recurring(attacks: number): Rhythm {
  const statements = FACTORS.map((factor) => augment(subject, factor));
  const line: Rhythm[number][] = [];
  let count = 0;
  for (let n = 0; count < attacks; n += 1) {
    const statement = statements[n % FACTORS.length]!;
    line.push(...statement);
    count += attacksIn(statement);
  }
  return line;
}

/**
 * A line whose measures hardly recur, so that remembering them helps little: quarters, halves and half measures in a sequence
 * without pattern, some divided in threes, fives or sevens.
 */
function varied(attacks: number): Rhythm {
  let state = 1;
  const next = (below: number): number => {
    state = (state * 48_271) % 2_147_483_647;
    return state % below;
  };
  const line: { length: Fraction; rest: boolean }[] = [];
  const lengths = new Map<string, Fraction>();
  const add = (n: number, d: number) => {
    const key = `${n}/${d}`;
    const length = lengths.get(key) ?? new Fraction(n, d);
    lengths.set(key, length);
    line.push({ length, rest: next(8) === 0 });
  };
  while (line.length < attacks) {
    const parts = [3, 5, 7][next(3)]!;
    if (next(4) === 0) for (let n = 0; n < parts; n += 1) add(1, 4 * parts);
    else for (let left = 8; left > 0;) {
      const taken = 1 + next(Math.min(left, 5));
      add(taken, 32);
      left -= taken;
    }
  }
  return line;
}

function studyOf(attacks: number): StudyInput {
  const statements = Math.ceil(attacks / attacksIn(subject));
  // A study has sections of up to 200 and statements of up to 256 each: the subject is repeated within a section's subject.
  const perSection = 40;
  const sections = 5;
  const repeats = Math.ceil(statements / (perSection * sections));
  const rhythm = Array.from({ length: repeats }, () => SUBJECT).join(' ');
  return {
    title: 'Measured', metre: '4/4', tempo: { beat: '1/4', perMinute: '84' },
    subjects: [{ id: 's', name: 'Subject', rhythm }],
    instruments: INSTRUMENTS.map((id) => ({ id, name: id, family: 'metal' })),
    sections: Array.from({ length: sections }, (_, n) => ({
      id: `s${n}`, name: `Section ${n + 1}`, role: 'development' as const, kind: 'process' as const, subject: 's',
      process: { kind: 'proportion' as const, factors: Array.from({ length: perSection }, (__, k) => FACTORS[k % FACTORS.length]!) },
      instruments: INSTRUMENTS,
    })),
  };
}

function spelling(title: string, lineOf: (attacks: number) => Rhythm): boolean {
  const sizes = SIZES.map((size): Sized => {
    const line = lineOf(size);
    const plain = doubles(line);
    return {
      attacks: attacksIn(line),
      ms: medianOf(() => spellLine(line, '4/4')),
      plainMs: medianOf(() => placePlain(plain, METRE)),
    };
  });
  return report(title, sizes);
}

function building(): boolean {
  const sizes = SIZES.map((size): Sized => {
    const study = parseStudy(studyOf(size));
    const { lines } = buildStudy(study);
    const plain = lines.map(({ rhythm }) => doubles(rhythm));
    return {
      attacks: lines.reduce((sum, { rhythm }) => sum + attacksIn(rhythm), 0),
      ms: medianOf(() => buildStudy(study)),
      plainMs: medianOf(() => plain.map((line) => placePlain(line, METRE))),
    };
  });
  return report('buildStudy: five sections of forty statements, the subject lengthened to the size', sizes);
}

function buildingStatements(): boolean {
  // Up to the limit of sections: growth by statements, not by the subject's length.
  const sizes = [1, 10, 100].map((sections): Sized => {
    const study = parseStudy({
      ...studyOf(1),
      sections: Array.from({ length: sections }, (_, n) => ({
        id: `s${n}`, name: `Section ${n + 1}`, role: 'development' as const, kind: 'process' as const, subject: 's',
        process: { kind: 'proportion' as const, factors: Array.from({ length: 77 }, (__, k) => FACTORS[k % FACTORS.length]!) },
        instruments: INSTRUMENTS,
      })),
    });
    const { lines } = buildStudy(study);
    const plain = lines.map(({ rhythm }) => doubles(rhythm));
    return {
      attacks: lines.reduce((sum, { rhythm }) => sum + attacksIn(rhythm), 0),
      ms: medianOf(() => buildStudy(study)),
      plainMs: medianOf(() => plain.map((line) => placePlain(line, METRE))),
    };
  });
  return report('buildStudy: sections of 77 statements of the subject', sizes);
}

console.log('Median of 9 runs in one process after 4 that do not count. Plain numbers: doubles, the same values, one pass, an array a measure; no notation.');
const held = [
  spelling('spellLine: the subject at 1, 5/4, 3/2, 2, again and again (measures recur and are remembered)', recurring),
  spelling('spellLine: measures that hardly recur, with tuplets of 3, 5 and 7', varied),
  building(),
  buildingStatements(),
];
process.exitCode = held.every(Boolean) ? 0 : 1;
console.log(process.exitCode === 0 ? '\nEvery growth is within the limit.' : '\nA growth passes the limit.');
