import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { SignInForm } from '@/components/sign-in-form';
import { SiteHeader } from '@/components/site-header';
import { readPerson } from '../person';
import { readTheme } from '../theme';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage() {
  return (
    <>
      <SiteHeader theme={readTheme(await cookies())} person={await readPerson()} />
      <main className="mx-auto max-w-[1100px] px-5 py-10 sm:px-8">
        <h1 className="text-[40px] font-[560] leading-none tracking-[-0.02em] [font-stretch:112%]">Sign in</h1>
        <p className="mt-4 max-w-[60ch] text-soft">
          You can open and change every demonstration, and start a study, without an account: it stays in your browser.
        </p>
        <SignInForm />
      </main>
    </>
  );
}
