import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { AccountPanels } from '@/components/account/account-panels';
import { PageHeading } from '@/components/ui/page-heading';
import { getCurrentUser } from '@/lib/server/current-user';
import { PageFrame } from '../page-frame';

export const metadata: Metadata = { title: 'Account' };

export default async function AccountPage() {
  if (!(await getCurrentUser())) redirect('/sign-in?next=/account');
  return (
    <PageFrame>
      <main className="mx-auto max-w-[1100px] px-5 pb-20 pt-10 sm:px-8">
        <PageHeading text="Account" />
        <AccountPanels />
      </main>
    </PageFrame>
  );
}
