import { expect, test } from '../helpers/browser';
import { drawnScore, openStudy, setWord, sentence } from './open';

const AIMS = { drawn: 100, system: 250 };

/**
 * Measured by the browser's own timeline and reported, never asserted: from changing a factor on the demo to sentence, strip
 * and threads drawn, and to the visible systems of the score drawn.
 */
test('reports the time from a changed factor to what is drawn', async ({ page }) => {
  await openStudy(page);
  await drawnScore(page);
  const drawn: number[] = [];
  const systems: number[] = [];
  for (const factor of ['5/2', '9/4', '7/4', '3', '2', '5/2', '9/4', '2']) {
    await page.evaluate(() => performance.clearMarks('sesqui:system'));
    await setWord(page, 'Factors', `1, 5/4, 3/2, ${factor}`);
    await expect(sentence(page)).toContainText(`3/2, ${factor} times`);
    await expect.poll(() => page.evaluate(() => performance.getEntriesByName('sesqui:system').length)).toBeGreaterThan(0);
    await page.waitForTimeout(400);
    const times = await page.evaluate(() => {
      const at = (name: string) => performance.getEntriesByName(name).map(({ startTime }) => startTime);
      const start = at('sesqui:change').at(-1)!;
      return {
        drawn: at('sesqui:drawn').find((time) => time >= start)! - start,
        system: at('sesqui:system').filter((time) => time >= start).at(-1)! - start,
      };
    });
    drawn.push(times.drawn);
    systems.push(times.system);
  }
  const middle = (list: number[]) => [...list].sort((a, b) => a - b)[Math.floor(list.length / 2)]!;
  console.log(
    `changed factor → sentence, strip, threads: median ${middle(drawn).toFixed(0)} ms, most ${Math.max(...drawn).toFixed(0)} ms (aim ${AIMS.drawn}); ` +
      `→ visible systems: median ${middle(systems).toFixed(0)} ms, most ${Math.max(...systems).toFixed(0)} ms (aim ${AIMS.system})`,
  );
  expect(drawn).toHaveLength(8);
  expect(drawn.every(Number.isFinite)).toBe(true);
  expect(systems.every(Number.isFinite)).toBe(true);
});
