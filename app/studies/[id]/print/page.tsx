import type { Metadata } from 'next';
import { PrintLoader } from '@/components/print/print-loader';
import { readPerson } from '../../../person';

export const metadata: Metadata = { title: 'Print' };

export default async function PrintPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const person = await readPerson();
  return <PrintLoader id={decodeURIComponent(id)} paperSize={person?.paperSize ?? 'a4'} />;
}
