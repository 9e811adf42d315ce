import type { Metadata } from 'next';
import { StudyLoader } from '@/components/study/study-loader';
import { readPerson } from '../../person';

export const metadata: Metadata = { title: 'Study' };

export default async function StudyPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const person = await readPerson();
  return <StudyLoader id={decodeURIComponent(id)} isSignedIn={person !== null} valueNames={person?.valueNames ?? 'american'} paper={person?.paperSize ?? 'a4'} />;
}
