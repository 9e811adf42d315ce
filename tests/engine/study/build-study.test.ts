import { describe, expect, it } from 'vitest';
import { type BuiltStudy, type Statement, buildStudy, formatFraction, formatRhythm, totalLength } from '@/engine';
import { free, mirror, stating, study } from './make-study';

const f = formatFraction;
const starts = ({ statements }: BuiltStudy) => statements.map((s) => f(s.start));
const rhythms = ({ statements }: BuiltStudy) => statements.map((s) => formatRhythm(s.rhythm));
const lineOf = (built: BuiltStudy, instrument: string) => formatRhythm(built.lines.find((line) => line.instrument === instrument)!.rhythm);
const short = (s: Statement) => [s.section, s.index, s.instrument, f(s.start), f(s.length), formatRhythm(s.rhythm)];

describe('entries', () => {
  const factors = ['1', '3/2', '2'];
  it.each([
    [undefined, ['0', '1', '5/2'], '9/2'],
    ['successive' as const, ['0', '1', '5/2'], '9/2'],
    ['together' as const, ['0', '0', '0'], '2'],
    ['ending-together' as const, ['1', '1/2', '0'], '2'],
    [{ every: '3/4' }, ['0', '3/4', '3/2'], '7/2'],
    [{ every: '5' }, ['0', '5', '10'], '12'],
  ])('%j', (entries, at, total) => {
    const built = buildStudy(study([stating({ factors, ...(entries === undefined ? {} : { entries }) })]));
    expect(starts(built)).toEqual(at);
    expect(f(built.totalLength)).toBe(total);
    expect(built.statements.map((s) => f(s.length))).toEqual(['1', '3/2', '2']);
    expect(built.statements.map((s) => s.instrument)).toEqual(['bell', 'block', 'drum']);
    expect(built.statements.map((s) => f(s.factor))).toEqual(factors);
  });

  it('every x, entered on one instrument before the one before has ended, overlaps', () => {
    expect(() => buildStudy(study([stating({ factors: ['1', '1'], entries: { every: '1/2' } }, { instruments: ['bell'] })]))).toThrow(
      expect.objectContaining({ code: 'overlap' }),
    );
  });

  it('every x as long as the statement is no overlap', () => {
    const built = buildStudy(study([stating({ factors: ['1', '1'], entries: { every: '1' } }, { instruments: ['bell'] })]));
    expect(lineOf(built, 'bell')).toBe('1/4 1/8 (1/8) 1/2 1/4 1/8 (1/8) 1/2');
  });

  it('statement k takes instrument k modulo their number', () => {
    const built = buildStudy(study([stating({ factors: ['1', '1', '1', '1', '1'] }, { instruments: ['pot', 'bell'] })]));
    expect(built.statements.map((s) => s.instrument)).toEqual(['pot', 'bell', 'pot', 'bell', 'pot']);
  });
});

describe('a proportion by ratio and count', () => {
  it('is 1, r, r², …', () => {
    const built = buildStudy(study([stating({ ratio: '3/2', count: 4 })]));
    expect(built.statements.map((s) => f(s.factor))).toEqual(['1', '3/2', '9/4', '27/8']);
    expect(starts(built)).toEqual(['0', '1', '5/2', '19/4']);
    expect(f(built.totalLength)).toBe('65/8');
  });
  it('may shrink, and may be one statement', () => {
    expect(buildStudy(study([stating({ ratio: '2/3', count: 3 })])).statements.map((s) => f(s.factor))).toEqual(['1', '2/3', '4/9']);
    expect(buildStudy(study([stating({ ratio: '7', count: 1 })])).statements.map((s) => f(s.factor))).toEqual(['1']);
  });
});

describe('reading and rotation', () => {
  it.each([
    ['forwards' as const, '1/4 1/8 (1/8) 1/2', [0, 1, null, 2]],
    ['backwards-values' as const, '1/2 (1/8) 1/8 1/4', [2, null, 1, 0]],
    ['backwards-attacks' as const, '1/8 (1/8) 1/4 1/2', [2, null, 1, 0]],
  ])('%s', (reading, rhythm, origins) => {
    const [statement] = buildStudy(study([stating({ factors: ['1'], reading })])).statements;
    expect([formatRhythm(statement!.rhythm), statement!.origins, statement!.reading]).toEqual([rhythm, origins, reading]);
  });

  it('one a statement, repeated in turn', () => {
    const built = buildStudy(
      study([stating({ factors: ['1', '1', '1', '1', '1'], readings: ['forwards', 'backwards-values'], rotations: [0, 1, 2] })]),
    );
    expect(built.statements.map((s) => s.reading)).toEqual(['forwards', 'backwards-values', 'forwards', 'backwards-values', 'forwards']);
    expect(built.statements.map((s) => s.rotation)).toEqual([0, 1, 2, 0, 1]);
    expect(rhythms(built)).toEqual([
      '1/4 1/8 (1/8) 1/2',
      '(1/8) 1/8 1/4 1/2',
      '(1/8) 1/2 1/4 1/8',
      '1/2 (1/8) 1/8 1/4',
      '1/8 (1/8) 1/2 1/4',
    ]);
    expect(built.statements.map((s) => s.origins)).toEqual([
      [0, 1, null, 2], [null, 1, 0, 2], [null, 2, 0, 1], [2, null, 1, 0], [1, null, 2, 0],
    ]);
  });

  it('marks and sounds go with their attacks', () => {
    const built = buildStudy(
      study([stating({ factors: ['1', '2'], readings: ['backwards-attacks', 'forwards'] })], {
        subjects: [{ id: 's', name: 'S', rhythm: '1/4>@1 1/8///@2 1/2^' }],
      }),
    );
    expect(rhythms(built)).toEqual(['1/8^ 1/4///@2 1/2>@1', '1/2>@1 1/4///@2 1^']);
  });
});

describe('before', () => {
  it('applies its steps to the subject first, first to last, and origins follow', () => {
    const built = buildStudy(
      study([
        stating({ factors: ['1', '2'] }, {
          before: [{ kind: 'rotate', steps: 1, by: 'values' }, { kind: 'add', amount: '1/8' }, { kind: 'retrograde', by: 'values' }],
        }),
      ]),
    );
    // 1/4 1/8 (1/8) 1/2 -> 1/8 (1/8) 1/2 1/4 -> 1/4 (1/8) 5/8 3/8 -> 3/8 5/8 (1/8) 1/4
    expect(rhythms(built)).toEqual(['3/8 5/8 (1/8) 1/4', '3/4 5/4 (1/4) 1/2']);
    expect(built.statements[0]!.origins).toEqual([0, 2, null, 1]);
    expect(built.statements.map((s) => f(s.factor))).toEqual(['1', '2']);
  });

  it('a rotation by pulse that cuts a value leaves its attack at the end, and no origin on the rest', () => {
    const built = buildStudy(study([stating({ factors: ['1'] }, { before: [{ kind: 'rotate', steps: 1, by: { pulse: '1/8' } }] })]));
    expect(rhythms(built)).toEqual(['(1/8) 1/8 (1/8) 1/2 1/8']);
    expect(built.statements[0]!.origins).toEqual([null, 1, null, 2, 0]);
  });
});

describe('free sections and lines under a process', () => {
  it('begin together, have no subject, and make the section as long as the longest', () => {
    const built = buildStudy(
      study([
        stating({ factors: ['1'] }, { under: [{ instrument: 'pot', rhythm: '1/4 (1/4) 1/4 1' }] }),
        free('b', [{ instrument: 'bell', rhythm: '1/2' }, { instrument: 'pot', rhythm: '(1/4) 1/2' }]),
      ]),
    );
    expect(built.sections.map((s) => [s.id, f(s.start), f(s.length)])).toEqual([['a', '0', '7/4'], ['b', '7/4', '3/4']]);
    expect(built.statements.map(short)).toEqual([
      ['a', 0, 'bell', '0', '1', '1/4 1/8 (1/8) 1/2'],
      ['a', 1, 'pot', '0', '7/4', '1/4 (1/4) 1/4 1'],
      ['b', 0, 'bell', '7/4', '1/2', '1/2'],
      ['b', 1, 'pot', '7/4', '3/4', '(1/4) 1/2'],
    ]);
    expect(built.statements.map((s) => s.subject)).toEqual(['s', null, null, null]);
    expect(built.statements[1]!.origins).toEqual([null, null, null, null]);
    expect([lineOf(built, 'bell'), lineOf(built, 'pot'), lineOf(built, 'drum')]).toEqual([
      '1/4 1/8 (1/8) 1/2 (3/4) 1/2 (1/4)', '1/4 (1/4) 1/4 1 (1/4) 1/2', '(5/2)',
    ]);
  });

  it('a section may be silent, or have no lines at all', () => {
    const built = buildStudy(study([free('a', []), free('b', [{ instrument: 'bell', rhythm: '(1)' }])]));
    expect(built.sections.map((s) => f(s.length))).toEqual(['0', '1']);
    expect(lineOf(built, 'bell')).toBe('(1)');
  });

  it('sections follow one another without a gap, also inside a measure', () => {
    const built = buildStudy(study([free('a', [{ instrument: 'bell', rhythm: '1/3' }]), free('b', [{ instrument: 'bell', rhythm: '1/5' }]), stating({ factors: ['1'] }, { id: 'c' })]));
    expect(built.sections.map((s) => f(s.start))).toEqual(['0', '1/3', '8/15']);
    expect(f(built.totalLength)).toBe('23/15');
  });
});

describe('mirror', () => {
  const source = stating({ factors: ['1', '3/2'], entries: { every: '1/2' }, reading: 'forwards' }, { under: [{ instrument: 'pot', rhythm: '1/4>@2 (1/4) 1/8' }] });

  it('puts what is at [s, e] at [L − e, L − s], each rhythm in retrograde by values', () => {
    const built = buildStudy(study([source, mirror('m', 'a')]));
    expect(f(built.sections[0]!.length)).toBe('2');
    const mirrored = built.statements.filter((s) => s.section === 'm');
    expect(new Set(mirrored.map((s) => short(s).slice(2).join(', ')))).toEqual(
      new Set(['block, 2, 3/2, 3/4 (3/16) 3/16 3/8', 'bell, 3, 1, 1/2 (1/8) 1/8 1/4', 'pot, 27/8, 5/8, 1/8 (1/4) 1/4>@2']),
    );
    expect(mirrored.every((s) => s.mirrored && s.reading === 'forwards')).toBe(true);
    expect(built.statements.filter((s) => s.section === 'a').some((s) => s.mirrored)).toBe(false);
    expect(mirrored.find((s) => s.instrument === 'bell')!.origins).toEqual([2, null, 1, 0]);
    expect(mirrored.find((s) => s.instrument === 'block')!.factor.toFraction()).toBe('3/2');
    expect(mirrored.map((s) => s.index)).toEqual([0, 1, 2]);
    const order = mirrored.map((s) => s.start);
    expect(order.every((start, i) => i === 0 || order[i - 1]!.compare(start) <= 0)).toBe(true);
  });

  it('by attacks turns each rhythm by attacks', () => {
    const built = buildStudy(study([source, mirror('m', 'a', 'attacks')]));
    const bell = built.statements.find((s) => s.section === 'm' && s.instrument === 'bell')!;
    expect([formatRhythm(bell.rhythm), bell.origins, f(bell.start)]).toEqual(['1/8 (1/8) 1/4 1/2', [2, null, 1, 0], '3']);
  });

  it('of a mirror gives the source back', () => {
    const built = buildStudy(study([source, mirror('m', 'a'), mirror('n', 'm')]));
    const of = (section: string) => built.statements.filter((s) => s.section === section).map((s) => ({ ...s, id: '', section: '', index: 0, start: f(s.start.sub(built.sections.find((one) => one.id === section)!.start)) }));
    const key = (s: { instrument: string | null }) => s.instrument ?? '';
    const sorted = (section: string) => of(section).sort((a, b) => key(a).localeCompare(key(b)));
    expect(sorted('n').map(({ mirrored: _m, ...s }) => s)).toEqual(sorted('a').map(({ mirrored: _m, ...s }) => s));
  });

  it('may stand before its source', () => {
    const built = buildStudy(study([mirror('m', 'a'), stating({ factors: ['1'] })]));
    expect(rhythms(built)).toEqual(['1/2 (1/8) 1/8 1/4', '1/4 1/8 (1/8) 1/2']);
  });

  it('keeps the reading and the rotation it mirrors', () => {
    const built = buildStudy(study([stating({ factors: ['2'], reading: 'backwards-values', rotations: [1] }), mirror('m', 'a')]));
    const [a, m] = built.statements;
    expect([m!.reading, m!.rotation, f(m!.factor), m!.subject]).toEqual([a!.reading, a!.rotation, f(a!.factor), a!.subject]);
    expect(formatRhythm(m!.rhythm)).toBe('1 1/2 1/4 (1/4)');
  });
});

describe('the document', () => {
  it('may leave the format out, which is then 1', () => {
    const one = study([stating({ factors: ['1'] })]);
    expect(buildStudy(one)).toEqual(buildStudy({ ...one, format: 1 }));
  });

  it('is left as it was', () => {
    const freeze = <T>(value: T): T => {
      if (typeof value === 'object' && value !== null) Object.values(Object.freeze(value)).forEach(freeze);
      return value;
    };
    const document = freeze(study([stating({ factors: ['1', '3/2'] }, { before: [{ kind: 'augment', factor: '2' }] }), free('b', []), mirror('c', 'a')]));
    const before = JSON.stringify(document);
    buildStudy(document);
    expect(JSON.stringify(document)).toBe(before);
  });

  it('builds the same twice', () => {
    const document = study([stating({ factors: ['1', '3/2'] }), mirror('c', 'a')]);
    expect(buildStudy(document)).toEqual(buildStudy(document));
  });

  it('travels through JSON', () => {
    const document = study([stating({ ratio: '3/2', count: 3, entries: { every: '1/3' } }), mirror('c', 'a', 'attacks')]);
    expect(buildStudy(JSON.parse(JSON.stringify(document)))).toEqual(buildStudy(document));
  });

  it('has statement ids that are all different', () => {
    const built = buildStudy(study([stating({ factors: ['1', '1'] }, { id: 'a.0' }), stating({ factors: ['1', '1'] }, { id: 'a' }), stating({ factors: ['1'] }, { id: 'a.0.0' })]));
    expect(new Set(built.statements.map((s) => s.id)).size).toBe(built.statements.length);
  });

  it('gives each declared instrument a line, in their order, all of the whole length', () => {
    const built = buildStudy(study([stating({ factors: ['1', '1/3'] }), free('b', [])]));
    expect(built.lines.map((line) => line.instrument)).toEqual(['bell', 'block', 'drum', 'pot']);
    for (const { rhythm } of built.lines) expect(totalLength(rhythm).equals(built.totalLength)).toBe(true);
  });
});
