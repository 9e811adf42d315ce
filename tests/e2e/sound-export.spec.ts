import { expect, test } from '@playwright/test';
import { lockGates } from '../../db/demo/lock-gates';
import { footbridge } from '../../db/demo/footbridge';
import { type StudyInput, buildStudy, clockOf, parseStudy, playEvents } from '../../engine';
import { bundleHarness, openHarness } from './sound/bundle';

const MILLISECOND = 0.001;
/** −1 dBFS. */
const LOUDEST = 10 ** (-1 / 20);

let script = '';
test.beforeAll(async () => {
  test.setTimeout(120_000);
  script = await bundleHarness('export-harness.ts');
});
test.beforeEach(async ({ page }) => openHarness(page, script));

/** A demo played over and over until ten minutes are full. */
const tenMinutes: StudyInput = {
  ...lockGates,
  title: 'Three locks',
  sections: [0, 1, 2].flatMap((round) => lockGates.sections.map((section) => ({ ...section, id: `${section.id}-${round}`, ...(section.kind === 'mirror' ? { of: `${section.of}-${round}` } : {}) }))),
};

function exact(document: StudyInput) {
  const study = parseStudy(document);
  const built = buildStudy(study);
  return { events: playEvents(study, built), seconds: clockOf(study, built).total.valueOf(), study };
}

test('ten minutes of music: every attack within a millisecond of its exact time, in the mix; in each stem of one round too', async ({ page }) => {
  test.setTimeout(300_000);
  const { events, seconds, study } = exact(tenMinutes);
  expect(seconds).toBeGreaterThan(600);

  const mix = await page.evaluate((document) => window.exported.look({ document, wish: { what: 'mix' } }), tenMinutes);
  const [whole] = mix.files;
  expect(whole!.frames / whole!.rate).toBeGreaterThanOrEqual(seconds);
  let worst = 0;
  for (const event of events) {
    const at = event.seconds.valueOf();
    const nearest = whole!.onsets.reduce((best, { time }) => Math.min(best, Math.abs(time - at)), Infinity);
    worst = Math.max(worst, nearest);
  }
  console.log(`mix of ${seconds.toFixed(0)} s: ${events.length} attacks, worst ${(worst * 1000).toFixed(3)} ms; rendered in ${(mix.milliseconds / 1000).toFixed(1)} s (${(seconds / (mix.milliseconds / 1000)).toFixed(1)} s of music a second), longest task ${mix.longest.toFixed(0)} ms`);
  expect(worst).toBeLessThan(MILLISECOND);

  const stems = await page.evaluate((document) => window.exported.look({ document, wish: { what: 'stems' }, bits: 16 }), lockGates);
  expect(stems.error).toBeNull();
  const { events: once } = exact(lockGates);
  const sounding = study.instruments.filter(({ id }) => events.some(({ instrument }) => instrument === id));
  expect(stems.files.map(({ name }) => name)).toEqual(sounding.map(({ name }) => `Lock Gates - ${name}.wav`));
  let worstOfStems = 0;
  sounding.forEach(({ id }, index) => {
    const own = once.filter(({ instrument }) => instrument === id);
    const { onsets } = stems.files[index]!;
    const loudest = Math.max(...onsets.map(({ level }) => level));
    // Strokes of a roll after its attack are weaker.
    const heard = onsets.filter(({ level }) => level > loudest * 0.85);
    expect(heard).toHaveLength(own.length);
    heard.forEach(({ time }, n) => (worstOfStems = Math.max(worstOfStems, Math.abs(time - own[n]!.seconds.valueOf()))));
  });
  // A test's browser keeps all files in memory, half a gigabyte of them: stems of ten minutes would be more.
  console.log(`stems: worst ${(worstOfStems * 1000).toFixed(3)} ms; rendered in ${(stems.milliseconds / 1000).toFixed(1)} s, longest task ${stems.longest.toFixed(0)} ms`);
  expect(worstOfStems).toBeLessThan(MILLISECOND);
});

test('nothing clips: the loudest demo, and thirty instruments struck as hard as they can be at once', async ({ page }) => {
  test.setTimeout(180_000);
  const crowd: StudyInput = {
    title: 'All at once', metre: '4/4', tempo: { beat: '1/4', perMinute: '160' },
    instruments: Array.from({ length: 30 }, (_, n) => ({ id: `i${n}`, name: `I ${n}`, family: (['metal', 'wood', 'skin', 'found'] as const)[n % 4]! })),
    sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines: Array.from({ length: 30 }, (_, n) => ({ instrument: `i${n}`, rhythm: '[1/8^]x16' })) }],
  };
  for (const document of [footbridge, crowd]) {
    for (const bits of [24, 16] as const) {
      const { files, inOrder } = await page.evaluate((asked) => window.exported.look(asked), { document, wish: { what: 'mix' as const }, real: true, bits, withOnsets: false });
      expect(files[0]!.peak).toBeLessThanOrEqual(LOUDEST + 1e-4);
      expect(files[0]!.peak).toBeGreaterThan(0.05);
      expect(files[0]!.bits).toBe(bits);
      expect(inOrder).toBe(true);
    }
  }
});

test('stems add up to the mix, and slices joined are what one rendering is', async ({ page }) => {
  test.setTimeout(180_000);
  const short: StudyInput = { ...footbridge, sections: footbridge.sections.slice(0, 2) };
  const { worst, stems, sameLength } = await page.evaluate((document) => window.exported.sumError(document), short);
  expect(stems).toBe(4);
  expect(sameLength).toBe(true);
  // Each of five numbers is rounded by half a step at most.
  expect(worst).toBeLessThanOrEqual(3);
  const slices = await page.evaluate((document) => window.exported.sliceError(document, 20), short);
  expect(slices.loudest).toBeGreaterThan(0.1);
  expect(slices.worst).toBeLessThan(1e-5);
});

test('a click for each player: count-in and beats to the millisecond, one file each; alone and over the music', async ({ page }) => {
  test.setTimeout(180_000);
  const all = await page.evaluate((document) => window.exported.look({ document, wish: { what: 'clicks', players: ['p1', 'p2'], withMusic: false }, real: true }), footbridge);
  expect(all.files.map(({ name }) => name)).toEqual(['Footbridge - Player 1 - click.wav', 'Footbridge - Player 2 - click.wav']);
  for (const [index, player] of ['p1', 'p2'].entries()) {
    const { times } = await page.evaluate(([document, who]) => window.exported.clicks(document, who), [footbridge, player] as const);
    const { onsets } = all.files[index]!;
    for (const time of times) expect(Math.min(...onsets.map((one) => Math.abs(one.time - time)))).toBeLessThan(MILLISECOND);
  }
  const over = await page.evaluate((document) => window.exported.look({ document, wish: { what: 'clicks', players: ['p1'], withMusic: true, countIn: 1 }, real: true, withOnsets: false }), footbridge);
  expect(over.files[0]!.peak).toBeLessThanOrEqual(LOUDEST + 1e-4);
});

test('a stroke that is stopped short is silent after its length; one that is not rings on', async ({ page }) => {
  const struck = (ends: 'choke' | 'let-ring'): StudyInput => ({
    title: 'One stroke', metre: '4/4', tempo: { beat: '1/4', perMinute: '60' }, instruments: [{ id: 'tam-tam', name: 'Tam-tam', family: 'metal', sound: 'tam-tam' }],
    sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines: [{ instrument: 'tam-tam', rhythm: '1/4 (3/4)', marks: [{ attack: 0, ends }] }] }],
  });
  const [choked, ringing] = await Promise.all((['choke', 'let-ring'] as const).map((ends) => page.evaluate((document) => window.exported.loudnessBetween(document, 1.05, 2), struck(ends))));
  expect(choked).toBeLessThan(1e-4);
  expect(ringing).toBeGreaterThan(0.01);
});

test('it can be given up', async ({ page }) => {
  const { error } = await page.evaluate((document) => window.exported.look({ document, wish: { what: 'stems' }, abortAt: 0.3 }), tenMinutes);
  expect(error).toBe('AbortError');
});
