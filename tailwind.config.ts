import type { Config } from 'tailwindcss';

/** Names for the colours of app/globals.css; their values change with the theme, these names do not. */
export default {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    extend: {
      colors: Object.fromEntries(
        ['paper', 'sheet', 'well', 'ink', 'quiet', 'rule', 'petrol', 'on-petrol', 'brass', 'low', 'high'].map((name) => [
          name,
          `var(--${name})`,
        ]),
      ),
      fontFamily: { sans: ['var(--font-words)', 'sans-serif'], figures: ['var(--font-figures)', 'monospace'] },
      borderRadius: { DEFAULT: '3px' },
    },
  },
} satisfies Config;
