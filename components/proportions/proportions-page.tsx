'use client';

import Link from 'next/link';
import { useState } from 'react';
import { PageHeading } from '../ui/page-heading';
import { useAddress } from '../ui/use-address';
import { AlignmentCalculator } from './alignment';
import { CanonCalculator, type Meeting } from './canon';
import { DivisionCalculator, type Way } from './division';
import { LengthsCalculator } from './lengths';
import { StretchCalculator } from './stretch';
import { TempoCalculator } from './tempo';

export type ProportionsAddress = {
  readonly lengths: string;
  readonly claim: string;
  readonly measures: string;
  readonly metre: string;
  readonly speed: string;
  readonly factor: string;
  readonly tempo: string;
  readonly pivots: string;
  readonly cycles: string;
  readonly cycleSpeed: string;
  readonly whole: string;
  readonly way: Way;
  readonly shares: string;
  readonly unit: string;
  readonly subject: string;
  readonly speeds: string;
  readonly meet: Meeting;
};

/** Six calculators on exact fractions; what they show is in the address. @param props.usual - what needs no place there */
export function ProportionsPage({ initial, usual }: { initial: ProportionsAddress; usual: ProportionsAddress }) {
  const [state, setState] = useState(initial);
  const set = (change: Partial<ProportionsAddress>) => setState((before) => ({ ...before, ...change }));
  useAddress(Object.fromEntries(Object.entries(state).filter(([field, value]) => value !== usual[field as keyof ProportionsAddress])));
  const { lengths, claim, measures, metre, speed, factor, tempo, pivots, cycles, cycleSpeed, whole, way, shares, unit, subject, speeds, meet } = state;
  return (
    <main className="mx-auto max-w-[1280px] px-5 pb-24 pt-10 sm:px-8 lg:px-12">
      <PageHeading text="Proportions" />
      <div className="mt-7 border-b border-ink">
        <LengthsCalculator lengths={lengths} claim={claim} set={set} />
        <StretchCalculator measures={measures} metre={metre} speed={speed} factor={factor} set={set} />
        <TempoCalculator tempo={tempo} pivots={pivots} set={set} />
        <AlignmentCalculator cycles={cycles} speed={cycleSpeed} set={set} />
        <DivisionCalculator whole={whole} way={way} shares={shares} unit={unit} set={set} />
        <CanonCalculator subject={subject} speeds={speeds} meet={meet} set={set} />
      </div>
      <p className="mt-10 text-[13.5px] text-soft">
        The same for programs:{' '}
        <Link href="/open-api" className="underline underline-offset-[3px]">
          open API
        </Link>
      </p>
    </main>
  );
}
