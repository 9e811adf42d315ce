import type { Metadata } from 'next';
import { z } from 'zod';
import { type ProportionsAddress, ProportionsPage } from '@/components/proportions/proportions-page';
import { PageFrame } from '../page-frame';

export const metadata: Metadata = { title: 'Proportions' };

const USUAL: ProportionsAddress = {
  lengths: '5, 7 1/2, 10, 15', claim: '3/2',
  measures: '8', metre: '4/4', speed: '84', factor: '3/2',
  tempo: '84', pivots: '3/8=1/4',
  cycles: '3/4, 5/8, 1', cycleSpeed: '84',
  whole: '89', way: 'golden', shares: '1, 2, 3', unit: '1',
  subject: '60', speeds: '3, 4, 5', meet: '1',
};

const text = z.string().min(1).max(1_000);
const address = z
  .object({ ...Object.fromEntries(Object.keys(USUAL).map((field) => [field, text])), way: z.enum(['ratios', 'golden', 'fibonacci', 'evenly']), meet: z.enum(['0', '1/2', '1']) })
  .partial();

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function Proportions({ searchParams }: Props) {
  const read = address.safeParse(await searchParams);
  return (
    <PageFrame>
      <ProportionsPage initial={{ ...USUAL, ...(read.success ? read.data : {}) }} usual={USUAL} />
    </PageFrame>
  );
}
