import type { Config } from 'tailwindcss';

/** The product's own palette and faces, as names: the values per theme stand in app/globals.css. */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    extend: {
      colors: {
        ground: 'var(--ground)',
        sheet: 'var(--sheet)',
        ink: 'var(--ink)',
        'ink-2': 'var(--ink-2)',
        rule: 'var(--rule)',
        'rule-strong': 'var(--rule-strong)',
        plate: 'var(--plate)',
        'plate-ink': 'var(--plate-ink)',
        live: 'var(--live)',
        measured: 'var(--measured)',
        danger: 'var(--danger)',
        'danger-ground': 'var(--danger-ground)',
      },
      fontFamily: {
        plate: ['"Sofia Sans Extra Condensed"', '"Noto Sans"', 'sans-serif'],
        sans: ['"Atkinson Hyperlegible Next"', '"Noto Sans"', 'sans-serif'],
        mono: ['"Atkinson Hyperlegible Mono"', '"Noto Sans"', 'monospace'],
      },
      minHeight: { touch: '3rem' },
      minWidth: { touch: '3rem' },
      borderRadius: { plate: '0.25rem' },
    },
  },
};

export default config;
