import localFont from 'next/font/local';

/** Text and controls: drawn so that 0/O, 1/l/I and 6/8 stay apart, which matters for laboratory numbers. */
export const textFace = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2',
  weight: '200 800',
  display: 'swap',
  variable: '--face-text',
  adjustFontFallback: 'Arial',
});

/** Names with letters outside Latin-1 (Ł, ő, ş): fetched only when a page holds one. */
export const textFaceExtended = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2',
  weight: '200 800',
  display: 'swap',
  variable: '--face-text-ext',
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value: 'U+0100-0130,U+0132-0151,U+0154-02BA,U+1E00-1E9F,U+1EF2-1EFF,U+2020,U+20A0-20AB,U+20AD-20C0,U+2113',
    },
  ],
});

export const displayFace = localFont({
  src: '../node_modules/@fontsource-variable/besley/files/besley-latin-wght-normal.woff2',
  weight: '400 900',
  display: 'swap',
  variable: '--face-display',
  adjustFontFallback: 'Times New Roman',
});

export const figuresFace = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-wght-normal.woff2',
  weight: '200 800',
  display: 'swap',
  variable: '--face-figures',
  preload: false,
  adjustFontFallback: false,
});
