'use client';

import dynamic from 'next/dynamic';

/** The print needs the browser's storage and fonts: nothing of it is made on the server. */
export const PrintLoader = dynamic(() => import('./print-page').then(({ PrintPage }) => PrintPage), { ssr: false });
