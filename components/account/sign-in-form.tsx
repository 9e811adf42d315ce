'use client';

import { signIn } from 'next-auth/react';
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from './ui/button';

const FIELD = 'mt-1 block w-full rounded border border-hair bg-paper px-3 py-2';

/** E-mail and password. The answer never tells whether an address is known. */
export function SignInForm() {
  const router = useRouter();
  const [error, setError] = useState<string | null>(null);
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
    setBusy(false);
    if (answer?.ok) {
      router.push('/studies');
      router.refresh();
    } else if (answer === undefined) setError('Sesqui cannot be reached. Check the connection and try again.');
    else setError('This e-mail address and password do not go together. Check both; after many attempts, wait a quarter of an hour.');
  };
  return (
    <form onSubmit={(event) => void send(event)} className="mt-6 grid max-w-96 gap-4">
      <label>
        E-mail
        <input name="email" type="email" required autoComplete="username" className={FIELD} />
      </label>
      <label>
        Password
        <input name="password" type="password" required autoComplete="current-password" className={FIELD} />
      </label>
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
