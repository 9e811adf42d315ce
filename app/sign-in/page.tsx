import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { SignInForm, signInWords } from '@/components/account/sign-in-form';
import { PageHeading } from '@/components/ui/page-heading';
import { nextAddress } from '@/lib/schemas/next-address';
import { PageFrame } from '../page-frame';
import { readPerson } from '../person';

export const metadata: Metadata = { title: 'Sign in' };

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function SignInPage({ searchParams }: Props) {
  const asked = await searchParams;
  const next = nextAddress(asked.next);
  if (await readPerson()) redirect(next);
  const error = typeof asked.error === 'string' ? signInWords(asked.error) : null;
  return (
    <PageFrame>
      <main className="mx-auto max-w-[1100px] px-5 py-10 sm:px-8">
        <PageHeading text="Sign in" />
        {asked.registered === '1' ? (
          <p role="status" className="mt-4 max-w-[60ch]">
            If no account had this address, it has one now: sign in with the password that you chose. If one had, it was left as it is.
          </p>
        ) : (
          <p className="mt-4 max-w-[60ch] text-soft">
            You can open and change every demonstration, and start a study, without an account: it stays in your browser, and moves into your account when you sign in.
          </p>
        )}
        <SignInForm next={next} error={error} />
        <p className="mt-6">
          <Link href={`/register?${new URLSearchParams({ next })}`} className="underline underline-offset-[3px]">
            Make an account
          </Link>
        </p>
      </main>
    </PageFrame>
  );
}
