'use client';

import { signOut } from 'next-auth/react';
import { useState } from 'react';
import { TextButton } from '../ui/button';

/** Signs out of this browser, and leaves for the first page. */
export function SignOutButton({ className = '', text = 'Sign out' }: { className?: string; text?: string }) {
  const [isBusy, setBusy] = useState(false);
  const [isUnreached, setUnreached] = useState(false);
  const leave = async () => {
    setBusy(true);
    setUnreached(false);
    await signOut({ callbackUrl: '/' }).catch(() => setUnreached(true));
    setBusy(false);
  };
  return (
    <>
      <TextButton className={className} disabled={isBusy} onClick={() => void leave()}>
        {text}
      </TextButton>
      {isUnreached && (
        <span role="alert" className="text-mark">
          You are still signed in: Sesqui cannot be reached.
        </span>
      )}
    </>
  );
}
