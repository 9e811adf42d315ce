'use client';

import { useQueryClient } from '@tanstack/react-query';
import Link from 'next/link';
import { useEffect, useState } from 'react';
import { type Moved, moveDrafts } from '@/lib/client/move-drafts';
import { isLocal } from '@/lib/client/study-draft';
import { TextButton } from './ui/button';

/** Who was signed in here when a page was last open; not there for nobody. */
const LAST_KEY = 'sesqui.signed-in';
const OWN_ID = /^[0-9a-f]{8}-[0-9a-f]{4}-/i;

/**
 * Moves what a guest began or changed in this browser into the account, at sign-in. What a signed-in person changes in a
 * demonstration afterwards stays in the browser until they keep it.
 */
export function MoveDraftsOnce({ userId }: { userId: string | null }) {
  const client = useQueryClient();
  const [moved, setMoved] = useState<readonly Moved[]>([]);
  const [problem, setProblem] = useState<string | null>(null);
  useEffect(() => {
    if (userId === null) {
      localStorage.removeItem(LAST_KEY);
      return;
    }
    const hasJustSignedIn = localStorage.getItem(LAST_KEY) !== userId;
    localStorage.setItem(LAST_KEY, userId);
    if (!hasJustSignedIn) return;
    moveDrafts((id) => isLocal(id) || !OWN_ID.test(id)).then(
      (all) => {
        setMoved(all);
        if (all.length > 0) void client.invalidateQueries({ queryKey: ['studies'] });
      },
      (error: unknown) => setProblem(error instanceof Error ? error.message : String(error)),
    );
  }, [userId, client]);

  if (moved.length === 0 && problem === null) return null;
  return (
    <div role="status" className="flex flex-wrap items-baseline gap-x-4 gap-y-1 border-b border-hair bg-wash px-5 py-2.5 text-[14px] sm:px-8 lg:px-12">
      {problem === null ? (
        <span>
          {'Moved from this browser into your account: '}
          {moved.map(({ id, title }, index) => (
            <span key={id}>
              {index > 0 && ', '}
              <Link href={`/studies/${id}`} className="underline underline-offset-[3px]">
                {title}
              </Link>
            </span>
          ))}
        </span>
      ) : (
        <span className="text-mark">{`What you began in this browser is still here only. ${problem}`}</span>
      )}
      <TextButton
        onClick={() => {
          setMoved([]);
          setProblem(null);
        }}
      >
        Close
      </TextButton>
    </div>
  );
}
