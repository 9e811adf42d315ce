import { expect, test } from '@playwright/test';
import { demoStudies } from '../../db/demo';
import { parseStudy } from '../../engine';
import { NAMED_SOUNDS } from '../../lib/client/player/sounds';
import { bundleHarness, openHarness } from './sound/bundle';
import { type Attack, expectedAttacks } from './sound/expected';
import type { Onset } from './sound/harness';

const RATE = 22_050;
const MILLISECOND = 0.001;

let script = '';

test.beforeAll(async () => {
  test.setTimeout(120_000);
  script = await bundleHarness();
});

test.beforeEach(async ({ page }) => {
  await openHarness(page, script);
});

/** Sets heard onsets against exact attacks. Strokes of a roll after its attack are weaker, and lie inside the roll. */
function compare(attacks: readonly Attack[], onsets: readonly Onset[], lead: number, speed = 1) {
  const loudest = Math.max(...onsets.map((onset) => onset.level));
  const heard = onsets.filter((onset) => onset.level > loudest * 0.85);
  const others = onsets.filter((onset) => onset.level <= loudest * 0.85);
  const errors = attacks.map((attack, i) => Math.abs((heard[i]?.time ?? Infinity) - lead - attack.seconds.valueOf() / speed));
  const stray = others.filter(({ time }) => {
    const score = (time - lead) * speed;
    return !attacks.some((a) => a.roll && score > a.seconds.valueOf() && score < a.seconds.add(a.lasts).valueOf());
  });
  return { heard: heard.length, strokes: others.length, stray: stray.length, worst: Math.max(0, ...errors) };
}

for (const { slug, study: document } of demoStudies) {
  test(`${slug}: every attack of every instrument within 1 ms of its exact time`, async ({ page }) => {
    test.setTimeout(240_000);
    const study = parseStudy(document);
    let worst = 0;
    let count = 0;
    for (const [instrument, attacks] of expectedAttacks(study)) {
      const rendering = await page.evaluate((wanted) => window.sound.render(wanted), { slug, instrument, rate: RATE });
      const result = compare(attacks, rendering.onsets, rendering.lead);
      expect(result.heard, `${instrument}: attacks heard`).toBe(attacks.length);
      expect(result.stray, `${instrument}: strokes outside of rolls`).toBe(0);
      expect(result.strokes > 0, `${instrument}: rolls heard`).toBe(attacks.some((attack) => attack.roll));
      expect(result.worst, `${instrument}: farthest from its time`).toBeLessThan(MILLISECOND);
      expect(rendering.missed).toBe(0);
      expect(rendering.status).toBe('stopped');
      worst = Math.max(worst, result.worst);
      count += attacks.length;
      console.log(`  ${slug} ${instrument}: ${attacks.length} attacks, worst ${(result.worst * 1e6).toFixed(1)} µs, rendered in ${Math.round(rendering.milliseconds)} ms`);
    }
    expect(count).toBeGreaterThan(50);
    console.log(`${slug}: ${count} attacks, farthest from its exact time ${(worst * 1e6).toFixed(1)} µs (a sample is ${(1e6 / RATE).toFixed(1)} µs)`);
  });
}

test('a slow practice speed and a loop keep their times within 1 ms', async ({ page }) => {
  test.setTimeout(120_000);
  const { slug, study: document } = demoStudies[0]!;
  const [instrument, attacks] = [...expectedAttacks(parseStudy(document))][0]!;
  const slow = await page.evaluate((wanted) => window.sound.render(wanted), { slug, instrument, rate: RATE, speed: 0.7, seconds: 60 });
  const within = attacks.filter((attack) => attack.seconds.valueOf() / 0.7 < 59);
  expect(within.length).toBeGreaterThan(10);
  expect(compare(within, slow.onsets, slow.lead, 0.7).worst).toBeLessThan(MILLISECOND);

  const [from, to] = [attacks[2]!.seconds.valueOf(), attacks[5]!.seconds.valueOf()];
  const loop = await page.evaluate((wanted) => window.sound.render(wanted), { slug, instrument, rate: RATE, options: { from, to, loop: true }, seconds: 60 });
  const rounds = loop.onsets.length / 3;
  expect(rounds).toBeGreaterThan(5);
  loop.onsets.forEach(({ time }, i) => {
    const exact = attacks[2 + (i % 3)]!.seconds.valueOf() - from + Math.floor(i / 3) * (to - from);
    expect(Math.abs(time - loop.lead - exact)).toBeLessThan(MILLISECOND);
  });
});

test('a change of speed and an edit while it plays lose no attack, double none and move none', async ({ page }) => {
  test.setTimeout(120_000);
  const { slug, study: document } = demoStudies[2]!;
  const [instrument, attacks] = [...expectedAttacks(parseStudy(document))][0]!;
  const wanted = { slug, instrument, rate: RATE };

  const edited = await page.evaluate((w) => window.sound.render(w), { ...wanted, change: { after: 7.3, what: 'reload' } as const });
  expect(edited.changedAt).toBeGreaterThan(7);
  expect(compare(attacks, edited.onsets, edited.lead)).toMatchObject({ heard: attacks.length, strokes: 0 });
  expect(compare(attacks, edited.onsets, edited.lead).worst).toBeLessThan(MILLISECOND);

  const slowed = await page.evaluate((w) => window.sound.render(w), { ...wanted, seconds: 40, change: { after: 7.3, what: 'half speed' } as const });
  const turn = slowed.changedAt! + 0.02 - slowed.lead;
  const exact = attacks.map((a) => a.seconds.valueOf()).map((s) => (s < turn ? s : turn + (s - turn) * 2)).filter((s) => s < 39);
  expect(exact.length).toBeGreaterThan(30);
  slowed.onsets.slice(0, exact.length).forEach(({ time }, i) => expect(Math.abs(time - slowed.lead - exact[i]!)).toBeLessThan(MILLISECOND));
});

test('each real sound begins within 10 ms through the whole chain', async ({ page }) => {
  test.setTimeout(120_000);
  let worst = { name: '', onset: 0 };
  for (const [family, sounds] of Object.entries(NAMED_SOUNDS)) {
    for (const name of Object.keys(sounds)) {
      const onset = await page.evaluate(([f, sound]) => window.sound.onsetThroughChain({ id: 'x', name: 'x', family: f as 'metal', sound }, 44_100), [family, name] as const);
      expect(onset, name).toBeGreaterThan(-MILLISECOND);
      expect(onset, name).toBeLessThan(0.01);
      if (onset > worst.onset) worst = { name, onset };
    }
  }
  console.log(`slowest onset: ${worst.name}, ${(worst.onset * 1000).toFixed(2)} ms`);
});

test('nothing is louder than the ceiling, even at full volume', async ({ page }) => {
  test.setTimeout(120_000);
  const { slug } = demoStudies[0]!;
  const loud = await page.evaluate((wanted) => window.sound.render(wanted), { slug, rate: RATE, real: true, volume: 0, seconds: 20 });
  const quiet = await page.evaluate((wanted) => window.sound.render(wanted), { slug, rate: RATE, real: true, seconds: 20 });
  expect(loud.peak).toBeLessThanOrEqual(0.5);
  expect(loud.peak).toBeGreaterThan(0.2);
  expect(quiet.peak).toBeLessThan(0.13);
  expect(quiet.peak).toBeGreaterThan(0.005);
});

test('in real time: it sounds, the place moves, an edit and a change of speed keep the place, stop is silent within 50 ms', async ({ page }) => {
  const report = await page.evaluate(async (slug) => {
    const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));
    const { player, loudness, suspend, clock, events, instruments, duration } = await window.sound.live(slug);
    const statuses: string[] = [];
    player.onStateChange(() => statuses.push(player.state.status));
    let longestTask = 0;
    new PerformanceObserver((list) => list.getEntries().forEach((task) => (longestTask = Math.max(longestTask, task.duration)))).observe({ entryTypes: ['longtask'] });
    const listen = async (): Promise<number> => {
      let loudest = 0;
      for (let i = 0; i < 40; i++) {
        loudest = Math.max(loudest, loudness());
        await wait(20);
      }
      return loudest;
    };
    await player.play({ from: 0 });
    const loudest = await listen();
    const [place, at] = [player.position(), clock()];
    await player.load(events.slice(0, 200), instruments, duration);
    const afterEdit = player.position() - place - (clock() - at);
    player.setSpeed(0.5);
    await wait(400);
    const [slowPlace, slowAt] = [player.position(), clock()];
    await wait(400);
    const pace = (player.position() - slowPlace) / (clock() - slowAt);
    player.pause();
    const paused = player.position();
    await wait(100);
    const resumedFrom = player.position();
    player.setSpeed(1);
    await player.play();
    await suspend();
    await wait(50);
    const whenSuspended = player.state.status;
    await player.play();
    const beforeStop = await listen();
    const stopAt = clock();
    player.stop();
    // The analyser holds 512 samples of the past, so they must have passed as well.
    while (clock() < stopAt + 0.05 + 512 / 44_100) await wait(2);
    const afterStop = loudness();
    await wait(600);
    const later = loudness();
    const { latency } = player;
    const { prepareMilliseconds, missed } = player.state;
    player.dispose();
    return { statuses: [...new Set(statuses)], loudest, afterEdit, pace, drift: resumedFrom - paused, whenSuspended, beforeStop, afterStop, later, latency, prepareMilliseconds, longestTask, missed, place };
  }, demoStudies[0]!.slug);
  console.log(report);
  expect(report.statuses).toEqual(['preparing', 'playing', 'paused', 'stopped']);
  expect(report.loudest).toBeGreaterThan(0.002);
  expect(report.place).toBeGreaterThan(0.3);
  expect(Math.abs(report.afterEdit)).toBeLessThan(0.03);
  expect(Math.abs(report.pace - 0.5)).toBeLessThan(0.05);
  expect(report.drift).toBe(0);
  expect(report.whenSuspended).toBe('paused');
  expect(report.beforeStop).toBeGreaterThan(0.002);
  expect(report.afterStop).toBeLessThan(1e-4);
  expect(report.later).toBeLessThan(1e-6);
  expect(report.missed).toBe(0);
  // Longer than 50 ms is what the browser itself calls a long task; twice that leaves room for a busy machine.
  expect(report.longestTask).toBeLessThan(100);
});
