import type { Metadata } from 'next';
import { StudiesList } from '@/components/studies/studies-list';
import { readPerson } from '../person';

export const metadata: Metadata = { title: 'Studies' };

export default async function StudiesPage() {
  return <StudiesList isSignedIn={(await readPerson()) !== null} />;
}
