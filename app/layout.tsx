import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import { AnnounceProvider } from '@/lib/ui/feedback/announce';
import { displayFace, figuresFace, textFace, textFaceExtended } from './fonts';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Loamline', template: '%s · Loamline' },
  description: 'Soil-test history, amendment records and honest effect checks for growers who test their soil.',
};

/** Every page carries a nonce of its own request, so none is made ahead of time. */
export const dynamic = 'force-dynamic';

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: '#fbf7f0',
  colorScheme: 'light',
};

const faces = [textFace, textFaceExtended, displayFace, figuresFace].map((face) => face.variable).join(' ');

export default function RootLayout({ children }: { children: ReactNode }) {
  return (
    <html lang="en" className={faces}>
      <body>
        <AnnounceProvider>{children}</AnnounceProvider>
      </body>
    </html>
  );
}
