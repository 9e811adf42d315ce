'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { beginStudy } from '@/lib/client/new-study';
import { buttonClass } from '../ui/button';

/** Begins a new study in this browser and opens it. */
export function StartStudy({ look = 'button' }: { look?: 'button' | 'link' }) {
  const router = useRouter();
  const [isRefused, setRefused] = useState(false);
  const begin = () => {
    const id = beginStudy();
    if (id === null) setRefused(true);
    else router.push(`/studies/${id}`);
  };
  return (
    <>
      <button
        type="button"
        onClick={begin}
        className={look === 'button' ? `${buttonClass('strong')} px-5! py-2.5!` : 'font-[560] text-ink underline underline-offset-[3px]'}
      >
        Start a study
      </button>
      {isRefused && (
        <span role="alert" className="mt-2 block text-[14px] text-mark">
          This browser does not let a study be kept: its storage is full or closed.
        </span>
      )}
    </>
  );
}
