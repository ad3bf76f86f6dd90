import localFont from 'next/font/local';

/**
 * The faces the product ships with, each under the SIL Open Font License beside its files.
 * Archivo and Source Serif 4 come as Latin subsets without √ π ≤ ≠; the complete IBM Plex Mono has
 * them and stands behind both in the theme, so that no sign falls to a font of the machine.
 */
export const grotesque = localFont({
  src: './archivo/archivo-latin-wght-normal.woff2',
  weight: '100 900',
  variable: '--font-grotesque',
  display: 'swap',
  adjustFontFallback: false,
});

export const grotesqueExt = localFont({
  src: './archivo/archivo-latin-ext-wght-normal.woff2',
  weight: '100 900',
  variable: '--font-grotesque-ext',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
});

export const serif = localFont({
  src: [
    { path: './source-serif/source-serif-4-latin-wght-normal.woff2', style: 'normal' },
    { path: './source-serif/source-serif-4-latin-wght-italic.woff2', style: 'italic' },
  ],
  weight: '200 900',
  variable: '--font-serif',
  display: 'swap',
  adjustFontFallback: false,
});

export const serifExt = localFont({
  src: './source-serif/source-serif-4-latin-ext-wght-normal.woff2',
  weight: '200 900',
  variable: '--font-serif-ext',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
});

export const serifGreek = localFont({
  src: './source-serif/source-serif-4-greek-wght-normal.woff2',
  weight: '200 900',
  variable: '--font-serif-greek',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
});

export const mono = localFont({
  src: [
    { path: './plex-mono/plex-mono-regular.woff2', weight: '400', style: 'normal' },
    { path: './plex-mono/plex-mono-medium.woff2', weight: '500', style: 'normal' },
  ],
  variable: '--font-mono',
  display: 'swap',
  adjustFontFallback: false,
});

/** Class names that make every face's CSS variable known below an element. */
export const faces = [grotesque, grotesqueExt, serif, serifExt, serifGreek, mono]
  .map((face) => face.variable)
  .join(' ');
