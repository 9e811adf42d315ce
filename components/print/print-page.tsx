'use client';

import Link from 'next/link';
import { useCallback, useEffect, useMemo, useState } from 'react';
import { type PrintScore, printScore } from '@/engine';
import type { VexFlow } from '@/lib/engraving/notes';
import { type PageOptions, STAFF_SIZES } from '@/lib/engraving/page-options';
import { type Layout, layOutPages } from '@/lib/engraving/pages';
import { loadVexFlow } from '../score/draw';
import { Button } from '../ui/button';
import { useAddress } from '../ui/use-address';
import { Sheet } from './sheet';
import { useDocument } from './use-document';

const FIELD = 'rounded border border-hair bg-paper px-2 py-1';
const SIZES = Array.from({ length: 9 }, (_, n) => STAFF_SIZES.least + n / 2);

/** Sheets are drawn one after another, so that the page answers meanwhile. */
function Sheets({ vexflow, score, options }: { vexflow: VexFlow; score: PrintScore; options: PageOptions }) {
  const layout = useMemo<Layout>(() => layOutPages(vexflow, score, options), [vexflow, score, options]);
  const [drawn, setDrawn] = useState(0);
  const next = useCallback(() => {
    setTimeout(() => setDrawn((count) => count + 1));
  }, []);
  const { pages, remarks, geometry } = layout;
  const isReady = drawn >= pages.length;
  return (
    <>
      <style>{`@page { size: ${geometry.paper.width}pt ${geometry.paper.height}pt; margin: 0 } @media print { header, .print-controls { display: none } html, body { background: #fff } .sheet { break-after: page; width: ${geometry.paper.width}pt !important; max-width: none } .sheet:last-child { break-after: auto } }`}</style>
      <div className="print-controls mx-auto mb-6 max-w-[70ch] px-5">
        <p aria-live="polite" className="text-[14px] text-soft">
          {isReady ? `${pages.length} ${pages.length === 1 ? 'page' : 'pages'}.` : `Drawing page ${Math.min(drawn + 1, pages.length)} of ${pages.length}…`}
        </p>
        {remarks.map((remark) => (
          <p key={remark} className="mt-1 text-[14px] text-mark">
            {remark}
          </p>
        ))}
        <Button kind="strong" className="mt-4" disabled={!isReady} onClick={() => window.print()}>
          Print
        </Button>
      </div>
      <ol className="px-3 print:p-0" data-ready={isReady}>
        {pages.slice(0, drawn + 1).map((page) => (
          <Sheet key={page.number} vexflow={vexflow} score={score} layout={layout} page={page} options={options} onDrawn={next} />
        ))}
      </ol>
    </>
  );
}

/** A score or a part as it comes out of the printer. What is chosen stands in the address. */
export function PrintPage({ id, paperSize }: { id: string; paperSize: 'a4' | 'letter' }) {
  const opened = useDocument(id);
  const [state, setState] = useState(() => {
    const asked = new URLSearchParams(window.location.search);
    return { part: asked.get('part') ?? '', paper: asked.get('paper') ?? paperSize, orientation: asked.get('orientation') ?? 'portrait', staff: asked.get('staff') ?? '' };
  });
  useAddress(state);
  const [vexflow, setVexflow] = useState<VexFlow | null>(null);
  useEffect(() => {
    void loadVexFlow().then(setVexflow);
  }, []);
  const study = opened.kind === 'open' ? opened.study : null;
  const player = study?.players.find((one) => one.id === state.part);
  const score = useMemo(() => (opened.kind === 'open' ? printScore(opened.study, opened.built, player === undefined ? {} : { part: player.id }) : null), [opened, player]);
  const staff = SIZES.includes(Number(state.staff)) ? Number(state.staff) : player === undefined ? STAFF_SIZES.score : STAFF_SIZES.part;
  const stamp = opened.kind === 'open' ? opened.stamp : '';
  const options = useMemo<PageOptions>(
    () => ({ paper: state.paper === 'letter' ? 'letter' : 'a4', orientation: state.orientation === 'landscape' ? 'landscape' : 'portrait', staff, stamp }),
    [state.paper, state.orientation, staff, stamp],
  );
  if (opened.kind === 'failed') {
    return (
      <main className="mx-auto max-w-[62ch] px-5 py-16">
        <p role="alert">{opened.message}</p>
      </main>
    );
  }
  return (
    <main className="py-8 print:p-0">
      <div className="print-controls mx-auto mb-4 max-w-[70ch] px-5">
        <h1 className="text-[26px] font-semibold">{study === null ? 'Print' : `Print ${study.title}`}</h1>
        <p className="mt-1 text-[14px]">
          <Link href={`/studies/${id}`} className="underline underline-offset-[3px]">
            Back to the study
          </Link>
        </p>
        <form className="mt-5 flex flex-wrap gap-x-5 gap-y-3 text-[14px]" onSubmit={(event) => event.preventDefault()}>
          <label>
            <span className="mb-1 block text-soft">What</span>
            <select className={FIELD} value={player?.id ?? ''} onChange={(event) => setState({ ...state, part: event.target.value })}>
              <option value="">Score</option>
              {study?.players.map((one) => (
                <option key={one.id} value={one.id}>
                  {`Part of ${one.name}`}
                </option>
              ))}
            </select>
          </label>
          <label>
            <span className="mb-1 block text-soft">Paper</span>
            <select className={FIELD} value={options.paper} onChange={(event) => setState({ ...state, paper: event.target.value })}>
              <option value="a4">A4</option>
              <option value="letter">Letter</option>
            </select>
          </label>
          <label>
            <span className="mb-1 block text-soft">Held</span>
            <select className={FIELD} value={options.orientation} onChange={(event) => setState({ ...state, orientation: event.target.value })}>
              <option value="portrait">upright</option>
              <option value="landscape">across</option>
            </select>
          </label>
          <label>
            <span className="mb-1 block text-soft">Height of a staff</span>
            <select className={FIELD} value={staff} onChange={(event) => setState({ ...state, staff: event.target.value })}>
              {SIZES.map((size) => (
                <option key={size} value={size}>{`${size} mm`}</option>
              ))}
            </select>
          </label>
        </form>
      </div>
      {score !== null && vexflow !== null ? <Sheets key={`${player?.id ?? ''} ${options.paper} ${options.orientation} ${staff}`} vexflow={vexflow} score={score} options={options} /> : <p className="px-5 text-center text-soft">Opening…</p>}
    </main>
  );
}
