import localFont from 'next/font/local';

/** Commissioner for words. */
export const words = localFont({
  src: '../node_modules/@fontsource-variable/commissioner/files/commissioner-latin-wght-normal.woff2',
  weight: '100 900',
  variable: '--font-words',
  display: 'swap',
});

/** B612, drawn for instrument panels, for every figure: its digits all have one width. */
export const figures = localFont({
  src: [
    { path: '../node_modules/@fontsource/b612/files/b612-latin-400-normal.woff2', weight: '400' },
    { path: '../node_modules/@fontsource/b612/files/b612-latin-700-normal.woff2', weight: '700' },
  ],
  variable: '--font-figures',
  display: 'swap',
});
