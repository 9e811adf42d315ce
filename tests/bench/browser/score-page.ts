import { OpenSheetMusicDisplay } from 'opensheetmusicdisplay';
import createVerovioModule from 'verovio/wasm';
import { VerovioToolkit } from 'verovio/esm';
import { drawOnScreen, loadVexFlow } from '../../../components/score/draw';
import { breakSystems } from '../../../components/score/layout';
import { type StudyInput, buildStudy, parseStudy, printScore, toMusicXML } from '../../../engine';
import { layOutPages } from '../../../lib/engraving/pages';
import { large } from '../../engraving/studies';

/** Built into one script and run in Chromium: the page's `measureScores`. */

const WIDTH = 1200;

function host(): HTMLDivElement {
  document.body.replaceChildren();
  const element = document.createElement('div');
  element.style.width = `${WIDTH}px`;
  document.body.append(element);
  return element;
}

/** Until the browser has painted. */
const painted = (): Promise<void> => new Promise((resolve) => requestAnimationFrame(() => setTimeout(resolve)));

async function timed(work: () => unknown): Promise<number> {
  const began = performance.now();
  await work();
  return performance.now() - began;
}

type Times = { readonly first: number; readonly whole: number };

/** From the document to the first system painted; from the document to every page laid out. */
async function ours(document: StudyInput): Promise<Times> {
  const vexflow = await loadVexFlow();
  const first = await timed(async () => {
    const study = parseStudy(document);
    const score = printScore(study, buildStudy(study));
    const { value } = breakSystems(score, WIDTH, { hideSilent: true, namesBeneath: false, words: new Map() }).next();
    if (value) drawOnScreen(vexflow, host(), score, value);
    await painted();
  });
  const whole = await timed(() => {
    const study = parseStudy(document);
    layOutPages(vexflow, printScore(study, buildStudy(study)), { paper: 'a4', orientation: 'landscape', staff: 5 });
  });
  return { first, whole };
}

/** From MusicXML to the first page painted; from MusicXML to every page laid out, which loading does. */
async function verovio(toolkit: VerovioToolkit, musicXml: string): Promise<Times> {
  toolkit.setOptions({ inputFrom: 'musicxml', breaks: 'auto', pageWidth: WIDTH * 2, pageHeight: 1600, scale: 50 });
  let whole = 0;
  const first = await timed(async () => {
    whole = await timed(() => toolkit.loadData(musicXml));
    host().innerHTML = toolkit.renderToSVG(1);
    await painted();
  });
  return { first, whole };
}

/** From MusicXML to everything painted, which it does at one go. */
async function sheetDisplay(musicXml: string): Promise<Times> {
  const display = new OpenSheetMusicDisplay(host(), { backend: 'svg', autoResize: false });
  const whole = await timed(async () => {
    await display.load(musicXml);
    display.render();
    await painted();
  });
  return { first: whole, whole };
}

const median = (list: readonly number[]): number => list.toSorted((a, b) => a - b)[Math.floor(list.length / 2)]!;
async function repeated(rounds: number, work: () => Promise<Times>): Promise<Times> {
  const times: Times[] = [];
  for (let round = 0; round < rounds; round += 1) times.push(await work());
  return { first: median(times.map(({ first }) => first)), whole: median(times.map(({ whole }) => whole)) };
}

async function measureScores(measures: number, rounds: number) {
  const study = large(8, measures);
  const musicXml = toMusicXML(study);
  const toolkit = new VerovioToolkit(await createVerovioModule());
  // Each draws a little first, so that none pays for being loaded.
  const small = large(8, 2);
  await ours(small);
  await verovio(toolkit, toMusicXML(small));
  await sheetDisplay(toMusicXML(small));
  return { ours: await repeated(rounds, () => ours(study)), verovio: await repeated(rounds, () => verovio(toolkit, musicXml)), sheetDisplay: await repeated(rounds, () => sheetDisplay(musicXml)) };
}

declare global {
  interface Window {
    measureScores: typeof measureScores;
  }
}

window.measureScores = measureScores;
