import type { Metadata } from 'next';
import { z } from 'zod';
import { CheckPage, type CheckAddress } from '@/components/check/check-page';
import { stepsSchema } from '@/engine';
import { PageFrame } from '../page-frame';

export const metadata: Metadata = { title: 'Check' };

/** The page with nothing in its address: an example with one mistake in it. */
const EXAMPLE: CheckAddress = {
  mode: 'check',
  subject: '3/8 1/8 1/4 (1/4) | 1/8 1/8 1/4 1/2',
  answer: '3/4 3/8 3/16 3/16 (1/4) 3/8 3/16 9/16',
  metre: '4/4',
  steps: [{ kind: 'retrograde', by: 'values' }, { kind: 'augment', factor: '3/2' }],
  from: '3/8 1/8 1/4 1/4',
  to: '1/2 1/2 1/4 3/4',
};

const text = z.string().max(10_000);
const address = z.object({ mode: z.enum(['check', 'find']), subject: text, answer: text, metre: z.string().max(60), from: text, to: text }).partial();

/** Steps from an address; what cannot be read is left out. */
function readSteps(given: unknown): CheckAddress['steps'] | undefined {
  if (typeof given !== 'string' || given.length > 5_000) return undefined;
  try {
    return stepsSchema.parse(JSON.parse(given));
  } catch {
    return undefined;
  }
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function Check({ searchParams }: Props) {
  const asked = await searchParams;
  const read = address.safeParse(asked);
  const given = read.success ? Object.fromEntries(Object.entries(read.data).filter(([, value]) => value !== undefined)) : {};
  const steps = readSteps(asked.steps);
  return (
    <PageFrame>
      <CheckPage initial={{ ...EXAMPLE, ...given, ...(steps ? { steps } : {}) }} />
    </PageFrame>
  );
}
