import { describe, expect, it } from 'vitest';
import { LIMITS, buildStudy, studySchema } from '@/engine';
import { buildError, free, mirror, stating, study } from './make-study';

const good = () => study([stating({ factors: ['1', '3/2'] }), free('b', [{ instrument: 'bell', rhythm: '1/4' }]), mirror('c', 'a')]);

/** The good study as plain JSON, with the field at `path` set, or taken away where the value is undefined. */
function withField(path: string, value: unknown): unknown {
  const document: unknown = JSON.parse(JSON.stringify(good()));
  const keys = path.split('.');
  const last = keys.pop()!;
  let at = document as Record<string, unknown>;
  for (const key of keys) at = at[key] as Record<string, unknown>;
  if (value === undefined) delete at[last];
  else at[last] = value;
  return document;
}

type Row = [what: string, path: string, value: unknown, code: string, says: RegExp];

const SHAPE: Row[] = [
  ['no title', 'title', undefined, 'invalid_document', /title/],
  ['an empty title', 'title', '', 'invalid_document', /title/],
  ['a title that is a number', 'title', 7, 'invalid_document', /title/],
  ['a title too long', 'title', 'a'.repeat(LIMITS.name + 1), 'too_large', /title/],
  ['another format', 'format', 2, 'invalid_document', /format/],
  ['no sections', 'sections', [], 'invalid_document', /sections/],
  ['no tempo', 'tempo', undefined, 'invalid_document', /tempo/],
  ['a factor that is not exact', 'sections.0.process.factors.1', 1.5, 'invalid_document', /factors/],
  ['no factors', 'sections.0.process.factors', [], 'invalid_document', /factors/],
  ['neither factors nor ratio', 'sections.0.process.factors', undefined, 'invalid_document', /ratio/],
  ['a count of no statements', 'sections.0.process', { kind: 'proportion', ratio: '2', count: 0 }, 'invalid_document', /count/],
  ['a ratio without a count', 'sections.0.process', { kind: 'proportion', ratio: '2' }, 'invalid_document', /ratio/],
  ['factors and a ratio with its count', 'sections.0.process', { kind: 'proportion', factors: ['1'], ratio: '2', count: 2 }, 'invalid_document', /ratio/],
  ['factors and a stray ratio', 'sections.0.process', { kind: 'proportion', factors: ['1'], ratio: '2' }, 'invalid_document', /ratio/],
  ['factors and a stray count', 'sections.0.process', { kind: 'proportion', factors: ['1'], count: 2 }, 'invalid_document', /ratio/],
  ['an unknown family', 'instruments.0.family', 'brass', 'invalid_document', /family/],
  ['an unknown role', 'sections.0.role', 'bridge', 'invalid_document', /role/],
  ['an unknown reading', 'sections.0.process.reading', 'upside-down', 'invalid_document', /reading/],
  ['an unknown kind of section', 'sections.0.kind', 'loop', 'invalid_document', /kind|section/],
  ['unknown entries', 'sections.0.process.entries', 'sometimes', 'invalid_document', /entries/],
  ['400 statements', 'sections.0.process.factors', Array(400).fill('1'), 'too_large', /256/],
  ['400 statements by ratio', 'sections.0.process', { kind: 'proportion', ratio: '1', count: 400 }, 'too_large', /256/],
  ['an unknown field of the study', 'colour', 'red', 'unknown_field', /colour/],
  ['an unknown field of a section', 'sections.0.swing', true, 'unknown_field', /swing/],
  ['an unknown field of a process', 'sections.0.process.swing', true, 'unknown_field', /swing/],
  ['an unknown field of an instrument', 'instruments.0.volume', 3, 'unknown_field', /volume/],
];

const MUSIC: Row[] = [
  ['a rhythm that cannot be read', 'subjects.0.rhythm', '1/4 1/0', 'invalid_rhythm', /divides by zero/],
  ['an empty subject', 'subjects.0.rhythm', '', 'invalid_rhythm', /empty/],
  ['a subject that is 10,000 characters of junk', 'subjects.0.rhythm', 'z'.repeat(10_000), 'invalid_rhythm', /not a value/],
  ['a line that cannot be read', 'sections.1.lines.0.rhythm', '1/4 x', 'invalid_rhythm', /x/],
  ['factor 0', 'sections.0.process.factors.1', '0', 'invalid_factor', /above 0/],
  ['a negative factor', 'sections.0.process.factors.1', '-1', 'invalid_factor', /above 0/],
  ['factor 10^9', 'sections.0.process.factors.1', '1000000000', 'invalid_factor', /1000/],
  ['factor 1/0', 'sections.0.process.factors.1', '1/0', 'invalid_fraction', /divides by zero/],
  ['a ratio whose powers run away', 'sections.0.process', { kind: 'proportion', ratio: '3/2', count: 200 }, 'invalid_factor', /1000/],
  ['entries every 0', 'sections.0.process.entries', { every: '0' }, 'invalid_argument', /above 0/],
  ['entries every minus one', 'sections.0.process.entries', { every: '-1' }, 'invalid_argument', /above 0/],
  ['entries every 1/0', 'sections.0.process.entries', { every: '1/0' }, 'invalid_fraction', /divides by zero/],
  ['an unknown subject', 'sections.0.subject', 'nobody', 'unknown_subject', /nobody/],
  ['no subject', 'sections.0.subject', undefined, 'unknown_subject', /subject/],
  ['nobody to play', 'sections.0.instruments', [], 'unknown_instrument', /instrument/],
  ['an unknown instrument', 'sections.0.instruments.1', 'harp', 'unknown_instrument', /harp/],
  ['an unknown instrument of a line', 'sections.1.lines.0.instrument', 'harp', 'unknown_instrument', /harp/],
  ['an unknown instrument under a section', 'sections.1.under', [{ instrument: 'harp', rhythm: '1/4' }], 'unknown_instrument', /harp/],
  ['an unknown instrument of a player', 'players', [{ id: 'p', name: 'P', instruments: ['harp'] }], 'unknown_instrument', /harp/],
  ['an unknown section to mirror', 'sections.2.of', 'zzz', 'unknown_section', /zzz/],
  ['a step that takes everything away', 'sections.0.before', [{ kind: 'add', amount: '-1/8' }], 'invalid_argument', /nothing/],
  ['a step with factor 0', 'sections.0.before', [{ kind: 'augment', factor: '0' }], 'invalid_factor', /above 0/],
  ['a metre that cannot be read', 'metre', '4/3', 'invalid_metre', /4\/3/],
  ['a section’s metre that cannot be read', 'sections.1.metre', 'x', 'invalid_metre', /x/],
  ['a tempo of 0', 'tempo.perMinute', '0', 'invalid_tempo', /above 0/],
  ['a section’s tempo of 0', 'sections.1.tempo', { beat: '0', perMinute: '60' }, 'invalid_tempo', /above 0/],
  ['a negative pickup', 'pickup', '-1/4', 'invalid_argument', /pickup/i],
  ['a pickup of a whole measure', 'pickup', '1', 'invalid_argument', /pickup/i],
  ['a pickup that cannot be read', 'pickup', '1/0', 'invalid_fraction', /divides by zero/],
];

describe.each([['shape', SHAPE], ['music', MUSIC]])('buildStudy refuses, by its %s,', (_group, rows) => {
  it.each(rows)('%s', (_what, path, value, code, says) => {
    const error = buildError(withField(path, value));
    expect(error.code).toBe(code);
    expect(error.message).toMatch(says);
    expect(error.message).toMatch(/[.?]$/);
    expect(error.message.length).toBeLessThan(400);
    expect(error.message).not.toContain('!');
  });

  it.each(rows)('and says where: %s', (_what, path, value) => {
    const error = buildError(withField(path, value));
    expect(error.path ?? error.section).toBeDefined();
  });
});

describe('buildStudy names the place of', () => {
  it.each([
    ['a factor', 'sections.0.process.factors.1', '1/0', 'sections.0.process.factors.1', 'a'],
    ['a subject’s rhythm', 'subjects.0.rhythm', '1/0', 'subjects.0.rhythm', 'a'],
    ['a line’s rhythm', 'sections.1.lines.0.rhythm', '1/0', 'sections.1.lines.0.rhythm', 'b'],
    ['an instrument of a section', 'sections.0.instruments.1', 'harp', 'sections.0.instruments.1', 'a'],
    ['a metre', 'sections.1.metre', '4/3', 'sections.1.metre', 'b'],
    ['a mirror', 'sections.2.of', 'zzz', 'sections.2.of', 'c'],
    ['an unknown field', 'sections.0.process.swing', 1, 'sections.0.process', undefined],
  ])('%s', (_what, path, value, place, section) => {
    const error = buildError(withField(path, value));
    expect([error.path, error.section]).toEqual([place, section]);
  });
});

describe('ids', () => {
  it.each([
    ['subjects', { id: 's', name: 'Again', rhythm: '1/4' }],
    ['instruments', { id: 'bell', name: 'Again', family: 'metal' }],
    ['sections', { id: 'a', name: 'Again', role: 'other', kind: 'free', lines: [] }],
  ])('twice among %s', (list, item) => {
    const document = JSON.parse(JSON.stringify(good())) as Record<string, unknown[]>;
    document[list]!.push(item);
    const error = buildError(document);
    expect(error.code).toBe('duplicate_id');
    expect(error.message).toContain(item.id);
  });

  it('twice among players', () => {
    const player = { id: 'p', name: 'P', instruments: ['bell'] };
    expect(buildError(withField('players', [player, player])).code).toBe('duplicate_id');
  });

  it('the same in different lists are no trouble', () => {
    expect(() => buildStudy(study([stating({ factors: ['1'] }, { id: 's' })], { players: [{ id: 's', name: 'S', instruments: ['bell'] }] }))).not.toThrow();
  });

  it.each(['__proto__', 'constructor', 'toString', 'a b', 'ü', '0'])('may be %j', (id) => {
    const built = buildStudy(study([stating({ factors: ['1'] }, { id }), mirror('m', id)]));
    expect(built.sections[0]!.id).toBe(id);
  });
});

describe('an instrument removed while in use', () => {
  it('is named, with the section', () => {
    const document = good();
    const error = buildError({ ...document, instruments: document.instruments.filter(({ id }) => id !== 'block') });
    expect([error.code, error.section, error.path]).toEqual(['unknown_instrument', 'a', 'sections.0.instruments.1']);
    expect(error.message).toContain('block');
  });
});

describe('rings of mirrors', () => {
  it('a mirror of itself', () => {
    const error = buildError(study([mirror('m', 'm')]));
    expect([error.code, error.section]).toEqual(['mirror_ring', 'm']);
    expect(error.message).toMatch(/“M” mirrors itself/);
  });

  it('two that mirror each other, all named', () => {
    const error = buildError(study([free('x', []), mirror('m', 'n'), mirror('n', 'm')]));
    expect(error.code).toBe('mirror_ring');
    expect(error.message).toMatch(/“M”/);
    expect(error.message).toMatch(/“N”/);
    expect(error.message).not.toMatch(/“X”/);
  });

  it('a mirror that only leads into a ring', () => {
    const error = buildError(study([mirror('l', 'm'), mirror('m', 'n'), mirror('n', 'm')]));
    expect(error.code).toBe('mirror_ring');
    expect(error.message).not.toMatch(/“L” mirrors/);
  });

  it('a chain of two hundred sections is none', () => {
    const chain = Array.from({ length: LIMITS.sections - 1 }, (_, k) => mirror(`m${k + 1}`, `m${k}`));
    const built = buildStudy(study([stating({ factors: ['1'] }, { id: 'm0' }), ...chain].reverse()));
    expect(built.sections).toHaveLength(LIMITS.sections);
    expect(built.statements.map((s) => s.mirrored)).toEqual(Array.from({ length: LIMITS.sections }, (_, k) => (LIMITS.sections - 1 - k) % 2 === 1));
  });
});

describe('two statements at once on one instrument', () => {
  it.each([
    ['together', stating({ factors: ['1', '2'], entries: 'together' }, { instruments: ['bell'] }), 'statement 1 of “A”', 'statement 2 of “A”'],
    ['one within the other', stating({ factors: ['2', '1'], entries: { every: '1/2' } }, { instruments: ['bell'] }), 'statement 1 of “A”', 'statement 2 of “A”'],
    ['the third within the first', stating({ factors: ['4', '1', '1'], entries: { every: '1' } }, { instruments: ['bell', 'block', 'bell'] }), 'statement 1 of “A”', 'statement 3 of “A”'],
    ['a line under it', stating({ factors: ['1'] }, { instruments: ['bell'], under: [{ instrument: 'bell', rhythm: '1/4' }] }), '“A”', 'line'],
    ['only its rests', stating({ factors: ['1'] }, { instruments: ['bell'], under: [{ instrument: 'bell', rhythm: '(1/4)' }] }), '“A”', 'line'],
    ['two free lines', free('a', [{ instrument: 'bell', rhythm: '1/4' }, { instrument: 'bell', rhythm: '1/8' }]), 'line 1 of “A”', 'line 2 of “A”'],
  ])('%s: an error that names both', (_what, section, one, other) => {
    const error = buildError(study([section]));
    expect([error.code, error.section]).toEqual(['overlap', 'a']);
    expect(error.message).toContain('Bell');
    expect(error.message).toContain(one);
    expect(error.message).toContain(other);
  });

  it('in a mirror is named in the mirror’s own words', () => {
    const lines = [{ instrument: 'bell', rhythm: '1/4' }];
    const error = buildError(study([free('a', lines), { ...mirror('m', 'a'), under: lines }]));
    expect([error.code, error.section]).toEqual(['overlap', 'm']);
    expect(error.message).toContain('“M”');
  });

  it('spans that only touch are not at once', () => {
    const section = stating({ factors: ['1', '1/3', '1/7'], entries: 'successive' }, { instruments: ['bell'] });
    expect(() => buildStudy(study([section, mirror('m', 'a')]))).not.toThrow();
  });
});

describe('what is too much', () => {
  it('400,001 values in all', () => {
    const subjects = [{ id: 's', name: 'S', rhythm: '[1/4 1/4 1/4 1/4 1/4 1/4 1/4 1/4 1/4 1/4]x1000' }];
    const error = buildError(study([stating({ factors: Array<string>(41).fill('1') })], { subjects }));
    expect(error.code).toBe('too_large');
    expect(error.message).toContain(String(LIMITS.studyValues));
  });

  it('lengths too fine to be counted', () => {
    const factors = ['1/997', '1/991', '1/983', '1/977', '1/971', '1/967', '1/953'];
    const error = buildError(study([stating({ factors })]));
    expect(error.code).toBe('too_fine');
    expect(error.message).toMatch(/too fine|too little in common/);
  });
});

describe('a document that is nothing of the kind', () => {
  it.each([null, undefined, 0, '', 'study', [], {}, { format: 1 }, { sections: {} }])('%j', (document) => {
    expect(buildError(document).code).toBe('invalid_document');
  });

  it('a process of a kind nobody knows', () => {
    const error = buildError(withField('sections.0.process.kind', 'inversion'));
    expect(['invalid_document', 'unknown_process']).toContain(error.code);
    expect(error.message).toMatch(/process|kind/);
  });

  it('the schema itself says the same', () => {
    expect(studySchema.safeParse(good()).success).toBe(true);
    expect(studySchema.safeParse(withField('colour', 1)).success).toBe(false);
  });
});
