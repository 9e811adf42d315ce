'use client';

import dynamic from 'next/dynamic';

/** The study page needs the browser's storage, canvas and sound: it is made there only. */
export const StudyLoader = dynamic(() => import('./study-page').then(({ StudyPage }) => StudyPage), {
  ssr: false,
  loading: () => <main className="mx-auto max-w-[62ch] px-5 py-16 text-[17px]">Opening…</main>,
});
