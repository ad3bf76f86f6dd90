import type { Config } from 'tailwindcss';

/** Colours are CSS variables so that light and dark differ in one place (app/globals.css). */
const colour = (name: string) => `var(--${name})`;

/**
 * The theme of the drawing sheet. Colours are named after what a yard works with; none carries a
 * meaning alone, a word or a sign always stands beside it.
 */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      limestone: colour('limestone'),
      sheet: colour('sheet'),
      hand: colour('hand'),
      ink: colour('ink'),
      soft: colour('soft'),
      rule: colour('rule'),
      hairline: colour('hairline'),
      ruddle: colour('ruddle'),
      'on-ruddle': colour('on-ruddle'),
      snapline: colour('snapline'),
      'snapline-wash': colour('snapline-wash'),
      lichen: colour('lichen'),
      'lichen-wash': colour('lichen-wash'),
      ochre: colour('ochre'),
      'ochre-wash': colour('ochre-wash'),
      'ruddle-wash': colour('ruddle-wash'),
    },
    fontFamily: {
      sans: [
        'var(--font-grotesque)',
        'var(--font-grotesque-ext)',
        'var(--font-mono)',
        'sans-serif',
      ],
      serif: [
        'var(--font-serif)',
        'var(--font-serif-ext)',
        'var(--font-serif-greek)',
        'var(--font-mono)',
        'serif',
      ],
      mono: ['var(--font-mono)', 'var(--font-serif-greek)', 'monospace'],
    },
    fontSize: {
      tag: ['0.6875rem', { lineHeight: '0.875rem', letterSpacing: '0.05em' }],
      small: ['0.8125rem', { lineHeight: '1.125rem' }],
      base: ['0.9375rem', { lineHeight: '1.5rem' }],
      source: ['0.9375rem', { lineHeight: '1.5rem' }],
      note: ['1.0625rem', { lineHeight: '1.625rem' }],
      figure: ['1.1875rem', { lineHeight: '1.5rem' }],
      value: ['1.375rem', { lineHeight: '1.875rem' }],
      head: ['1.625rem', { lineHeight: '2rem' }],
      title: ['2.25rem', { lineHeight: '2.625rem' }],
    },
    extend: {
      borderRadius: { cut: '2px' },
      maxWidth: { prose: '40rem', page: '72rem', sheet: '92rem' },
      spacing: { zone: '1.25rem', balloon: '2.25rem' },
    },
  },
};

export default config;
