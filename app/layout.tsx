import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import { currentPerson } from '@/lib/server/auth/person';
import { Providers } from '@/components/shell/providers';
import { figures, words } from './fonts';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Evenhead', template: '%s · Evenhead' },
  description: 'Hydronic loops designed, balanced and handed over: one record from the drawing to the owner’s signed report.',
};

export const viewport: Viewport = { width: 'device-width', initialScale: 1 };

export default async function RootLayout({ children }: { children: ReactNode }) {
  const person = await currentPerson();
  return (
    <html lang="en" data-theme={person?.theme ?? 'system'} className={`${words.variable} ${figures.variable}`}>
      <body>
        <Providers personId={person?.id ?? null} units={person?.units ?? {}}>{children}</Providers>
      </body>
    </html>
  );
}
