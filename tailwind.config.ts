import type { Config } from 'tailwindcss';

const token = (name: string) => `var(--${name})`;

/** The theme only names the CSS variables of src/app/index.css: one place says a colour, per theme. */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    extend: {
      colors: Object.fromEntries(
        [
          'paper', 'card', 'ink', 'dim', 'rule', 'line', 'maple', 'pine', 'on-wood', 'film', 'film-2', 'film-edge', 'red', 'on-red', 'amber',
          'amber-fill', 'on-amber', 'green', 'on-green', 'league', 'on-league', 'open', 'cap', 'cap-line', 'deck', 'pin', 'approach',
        ].map((name) => [name, token(name)]),
      ),
      fontFamily: { sans: ['"Archivo Variable"', 'system-ui', 'sans-serif'] },
      minHeight: { hand: '48px', desk: '32px' },
      minWidth: { hand: '48px', desk: '32px' },
    },
  },
} satisfies Config;
