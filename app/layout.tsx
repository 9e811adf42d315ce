import '@fontsource-variable/archivo/wdth.css';
import '@fontsource-variable/source-serif-4/index.css';
import '@fontsource/noto-music/index.css';
import './globals.css';

import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { MoveDraftsOnce } from '@/components/move-drafts-once';
import { Providers } from '@/components/providers';
import { getCurrentUser } from '@/lib/server/current-user';
import { readTheme } from './theme';

export const metadata: Metadata = {
  title: { default: 'Sesqui', template: '%s · Sesqui' },
  description: 'One rhythm, stretched, reversed and passed from hand to hand by an exact rule: written, heard, and handed out.',
};

export const viewport: Viewport = { width: 'device-width', initialScale: 1 };

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = readTheme(await cookies());
  const user = await getCurrentUser().catch(() => null);
  return (
    <html lang="en" data-theme={theme === 'system' ? undefined : theme} suppressHydrationWarning>
      <body>
        <Providers>
          <MoveDraftsOnce userId={user?.id ?? null} />
          {children}
        </Providers>
      </body>
    </html>
  );
}
