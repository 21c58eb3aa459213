import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import { palettes } from '@/components/theme/palettes';
import { requestWorkstation } from '@/components/theme/request-workstation';
import { monoFace, textFace } from '@/components/theme/typefaces';
import { WorkstationProvider } from '@/components/theme/workstation';
import { TitleKeeper } from '@/components/ui/page-title';
import './globals.css';

export const metadata: Metadata = {
  icons: { icon: '/icon.svg' },
  robots: { index: false, follow: false },
};

export async function generateViewport(): Promise<Viewport> {
  const { palette } = await requestWorkstation();
  return { width: 'device-width', initialScale: 1, themeColor: palettes[palette].surface };
}

/** Palette and language are in the first bytes of the page, so that a dark room never sees a white frame. */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const workstation = await requestWorkstation();
  return (
    <html
      lang={workstation.locale}
      data-palette={workstation.palette}
      className={`${textFace.variable} ${monoFace.variable}`}
      suppressHydrationWarning
    >
      <body>
        <WorkstationProvider {...workstation}>
          <TitleKeeper>{children}</TitleKeeper>
        </WorkstationProvider>
      </body>
    </html>
  );
}
