'use client';

import { signIn } from 'next-auth/react';
import { type FormEvent, useState } from 'react';
import { Button } from '../ui/button';
import { Field } from '../ui/field';

const WORDS: Record<string, string> = {
  CredentialsSignin: 'This e-mail address and password do not go together. Check both; after many attempts, wait a quarter of an hour.',
  too_many_attempts: 'There were many attempts with this address. Wait a quarter of an hour, and try again.',
  unavailable: 'Sesqui cannot look this up at the moment. Try again shortly.',
};
const UNREACHED = 'Sesqui cannot be reached. Check the connection and try again.';

/** Why signing in did not work, in words; the answer never tells whether an address is known. */
export const signInWords = (code: string | null | undefined): string => WORDS[code ?? ''] ?? 'Signing in did not work. Try again.';

/** E-mail and password. @param props.next - an address of ours, to go to afterwards */
export function SignInForm({ next, error: given }: { next: string; error: string | null }) {
  const [error, setError] = useState<string | null>(given);
  const [isBusy, setBusy] = useState(false);
  const send = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    setBusy(true);
    const answer = await signIn('credentials', {
      email: String(form.get('email') ?? ''),
      password: String(form.get('password') ?? ''),
      redirect: false,
    }).catch(() => undefined);
    if (answer?.ok) {
      // A whole new page: nothing of what nobody, or somebody else, has seen stays in memory.
      window.location.assign(next);
      return;
    }
    setBusy(false);
    setError(answer === undefined ? UNREACHED : signInWords(answer.error));
  };
  return (
    <form onSubmit={(event) => void send(event)} className="mt-6 grid max-w-96 gap-4">
      <Field label="E-mail" name="email" type="email" required autoComplete="username" />
      <Field label="Password" name="password" type="password" required autoComplete="current-password" />
      {error && (
        <p role="alert" className="text-mark">
          {error}
        </p>
      )}
      <Button type="submit" kind="strong" disabled={isBusy}>
        Sign in
      </Button>
    </form>
  );
}
