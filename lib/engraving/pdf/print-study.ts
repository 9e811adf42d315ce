import { zipSync } from 'fflate';
import { buildStudy, EngineError, type PrintScore, printScore, type Study } from '@/engine';
import { distinctNames, fileName } from '../../file-names';
import { FILE_TYPES } from '../../file-types';
import { musicFile, type MusicKind } from '../../music-files';
import { drawPage } from '../draw-page';
import type { openNodeEngraver } from '../node-environment';
import type { PageOptions } from '../page-options';
import { layOutPages, type Layout } from '../pages';
import type { PrintedFile, PrintRequest } from './messages';
import { writePdf } from './write-pdf';

type Engraver = Awaited<ReturnType<typeof openNodeEngraver>>;
type Report = (done: number, total: number) => void | Promise<void>;

/** Lets messages in between pages: a process that only draws would not hear that nobody waits any more. */
const breathe = (): Promise<void> => new Promise((go) => setImmediate(go));

/** One page after another, so that only one is held at a time. */
function* drawn({ vf, document }: Engraver, score: PrintScore, layout: Layout, options: PageOptions): Generator<Element> {
  for (const page of layout.pages) {
    const host = document.createElement('div');
    document.body.replaceChildren(host);
    yield drawPage(vf, host, score, layout, page, options).svg;
  }
}

/** @throws EngineError where a line cannot be written, with the instrument's name */
function scoreFor(study: Study, player?: string): PrintScore {
  const score = printScore(study, buildStudy(study), player === undefined ? {} : { part: player });
  const [failure] = score.failures;
  if (failure !== undefined) throw new EngineError(failure.error.code, `${failure.instrument.name}: ${failure.error.message}`);
  return score;
}

async function printOne(engraver: Engraver, { study, options, madeAt }: PrintRequest, player: string | undefined, report: Report): Promise<PrintedFile> {
  if (options === undefined) throw new Error('A print was asked for without saying on what.');
  const score = scoreFor(study, player);
  const layout = layOutPages(engraver.vf, score, options);
  const total = layout.pages.length;
  await report(0, total);
  const name = score.part?.name;
  const info = { title: name === undefined ? study.title : `${study.title}: ${name}`, author: study.composer, label: name, madeAt };
  const bytes = await writePdf(drawn(engraver, score, layout, options), info, async (done) => {
    await report(done, total);
    await breathe();
  });
  return { bytes, type: FILE_TYPES.pdf, name: fileName([study.title, name ?? ''], 'pdf') };
}

/** What the engine writes by itself, which here keeps nobody waiting. */
async function write({ study, player }: PrintRequest, as: MusicKind, report: Report): Promise<PrintedFile> {
  await report(0, 1);
  await breathe();
  const part = player === undefined ? undefined : study.players.find(({ id }) => id === player)?.name;
  return { bytes: musicFile(study, as, player), type: FILE_TYPES[as], name: fileName([study.title, part ?? ''], as) };
}

/** DOS times, which a zip has, begin with 1980. */
const zipTime = (madeAt: Date): Date => new Date(Math.max(madeAt.getTime(), Date.UTC(1980, 0, 2)));

/**
 * Prints a study: the score or a part as PDF, or every part in a zip; or writes it for other programs.
 * @param report - told how many pages, or of several parts parts, are made, and how many there will be
 * @throws EngineError where the study cannot be built or written, or has no such player
 */
export async function printStudy(engraver: Engraver, request: PrintRequest, report: Report): Promise<PrintedFile> {
  const { study, what, as, player, madeAt } = request;
  if (as !== 'pdf') return write(request, as, report);
  if (what === 'score') return printOne(engraver, request, undefined, report);
  if (what === 'part') return printOne(engraver, request, player, report);
  const total = study.players.length;
  if (total === 0) throw new EngineError('invalid_argument', 'This study has no players, and so no parts: name who plays which instruments first.');
  await report(0, total);
  const files: PrintedFile[] = [];
  for (const { id } of study.players) {
    files.push(await printOne(engraver, request, id, breathe));
    await report(files.length, total);
  }
  const names = distinctNames(files.map(({ name }) => name));
  // PDFs are compressed already.
  const entries = Object.fromEntries(files.map(({ bytes }, n) => [names[n]!, [bytes, { level: 0 as const, mtime: zipTime(madeAt) }] as const]));
  return { bytes: zipSync(entries as Parameters<typeof zipSync>[0]), type: FILE_TYPES.zip, name: fileName([study.title, 'parts'], 'zip') };
}
