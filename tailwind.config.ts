import type { Config } from 'tailwindcss';

const token = (name: string) => `var(--${name})`;

export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    extend: {
      colors: Object.fromEntries(
        [
          'paper', 'card', 'ink', 'dim', 'rule', 'maple', 'pine', 'film', 'film-2', 'red', 'on-red', 'amber', 'amber-fill', 'on-amber',
          'green', 'on-green', 'league', 'on-league', 'cap', 'cap-line', 'deck', 'pin', 'approach',
        ].map((name) => [name, token(name)]),
      ),
      fontFamily: { sans: ['"Archivo Variable"', 'system-ui', 'sans-serif'] },
    },
  },
} satisfies Config;
