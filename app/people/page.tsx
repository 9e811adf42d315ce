import type { Metadata } from 'next';
import { notFound, redirect } from 'next/navigation';
import { PeopleList } from '@/components/people/people-list';
import { PageHeading } from '@/components/ui/page-heading';
import { getCurrentUser } from '@/lib/server/current-user';
import { PageFrame } from '../page-frame';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const user = await getCurrentUser();
  if (!user) redirect('/sign-in?next=/people');
  if (user.role !== 'administrator') notFound();
  return (
    <PageFrame>
      <main className="mx-auto max-w-[1100px] px-5 pb-20 pt-10 sm:px-8">
        <PageHeading text="People" />
        <p className="mt-4 max-w-[64ch] text-soft">Accounts, their roles, and whether they are open. Nobody’s work is shown here.</p>
        <PeopleList ownId={user.id} />
      </main>
    </PageFrame>
  );
}
