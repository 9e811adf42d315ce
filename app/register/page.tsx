import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { RegisterForm } from '@/components/account/register-form';
import { PageHeading } from '@/components/ui/page-heading';
import { nextAddress } from '@/lib/schemas/next-address';
import { PageFrame } from '../page-frame';
import { readPerson } from '../person';

export const metadata: Metadata = { title: 'Make an account' };

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function RegisterPage({ searchParams }: Props) {
  const next = nextAddress((await searchParams).next);
  if (await readPerson()) redirect(next);
  return (
    <PageFrame>
      <main className="mx-auto max-w-[1100px] px-5 py-10 sm:px-8">
        <PageHeading text="Make an account" />
        <p className="mt-4 max-w-[60ch] text-soft">
          Your studies are then saved by themselves, every version is kept, and you find them on any machine. What you began in this browser moves in when you sign in.
        </p>
        <RegisterForm next={next} />
        <p className="mt-6">
          <Link href={`/sign-in?${new URLSearchParams({ next })}`} className="underline underline-offset-[3px]">
            I have an account
          </Link>
        </p>
      </main>
    </PageFrame>
  );
}
