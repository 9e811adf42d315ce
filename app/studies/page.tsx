import type { Metadata } from 'next';
import { StudiesList } from '@/components/studies/studies-list';

export const metadata: Metadata = { title: 'Studies' };

export default function StudiesPage() {
  return <StudiesList />;
}
