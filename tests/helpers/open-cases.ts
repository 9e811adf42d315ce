/** Published values through the open API: what they are and where from, the address, the question, what the answer must hold. */
export const CASES_OF_CHECK: readonly (readonly [source: string, path: string, body: object, expected: object])[] = [
  ['Messiaen, Technique, ch. IV: 5/4 of quarter, eighth, quarter', '/api/transform', { rhythm: '1/4 1/8 1/4', steps: [{ kind: 'augment', factor: '5/4' }] }, { rhythm: '5/16 5/32 5/16', total: '25/32' }],
  ['Feron, universalis.fr: the retrograde of q s q q', '/api/transform', { rhythm: '1/4 1/16 1/4 1/4', steps: [{ kind: 'retrograde', by: 'values' }] }, { rhythm: '1/4 1/4 1/16 1/4' }],
  ['Mazzola et al., epOs 2004, 9.2: attacks reversed', '/api/transform', { rhythm: '3/8 1/8 1/4 1/4', steps: [{ kind: 'retrograde', by: 'attacks' }] }, { attacks: ['0', '1/4', '3/8', '3/4'] }],
  ['nathanmuehl.com, 24.3: augmented', '/api/check', { subject: '1/4 1/4 1/8', steps: [{ kind: 'augment', factor: '2' }], answer: '1/2 1/2 1/4' }, { correct: true, marks: { got: 3, of: 3 } }],
  ['an inverted factor', '/api/check', { subject: '1/4 1/8 1/4', steps: [{ kind: 'augment', factor: '2' }], answer: '1/8 1/16 1/8' }, { correct: false, diagnoses: [{ code: 'factor-inverted' }, { code: 'wrong-factor' }, { code: 'other-unit' }] }],
  ['what was done: values reversed and doubled', '/api/find', { from: '3/8 1/8 1/4 1/4', to: '1/2 1/2 1/4 3/4' }, { found: [{ factor: '2', retrograde: 'values', rotation: 0 }, { factor: '2', retrograde: 'attacks', rotation: 3 }], nearest: null }],
  ['Hutchinson, 11.2: some values only is no augmentation', '/api/find', { from: '1/4 1/8 1/4', to: '1/2 1/4 1/4' }, { found: [], nearest: { ratios: ['2', '2', '1'] } }],
  ['T3: 4 6 8 12 are no equal steps', '/api/proportions/lengths', { lengths: ['4', '6', '8', '12'], claim: '150%' }, { total: '30', equalSteps: false, claim: { holds: false, step: 1, run: ['4', '6', '9', '27/2'] } }],
  ['Winold, 1975: 84 to 126', '/api/proportions/tempo', { tempo: { beat: '1/4', perMinute: '84' }, pivots: [{ before: '1/3', after: '1/2' }] }, { tempos: [{ perMinute: '84' }, { perMinute: '126' }] }],
  ['13.5: 8 and 9 meet after 72', '/api/proportions/alignment', { cycles: ['8', '9'] }, { meet: '72', turns: ['9', '8'] }],
  ['Sunzi suanjing, III, 26, from memory: 23', '/api/proportions/alignment', { cycles: [{ length: '3', entry: '2' }, { length: '5', entry: '3' }, { length: '7', entry: '2', repeats: 2 }] }, { meet: '23', ended: 2, period: '105' }],
  ['Lendvai, from memory: 89 is 55 and 34', '/api/proportions/division', { whole: '89', ratios: ['55', '34'] }, { parts: [{ exact: '55' }, { exact: '34' }] }],
  ['Polansky: 2:3 enters at 1/3 of the whole', '/api/proportions/canon', { length: '3', speeds: ['1', '3/2'] }, { voices: [{ delay: '0' }, { delay: '1', length: '2' }] }],
  ['4/3 of 4/4 is no metre', '/api/proportions/stretch', { measures: '6', metre: '4/4', tempo: { beat: '1/4', perMinute: '60' }, factor: '4/3' }, { measures: '8', seconds: '32', name: 'sesquitertia', writing: { metre: null } }],
];
