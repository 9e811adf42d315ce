import type { Config } from 'tailwindcss';

/** Colours are jobs, set as custom properties in globals.css for light and dark; nothing here names a shade. */
const config: Config = {
  content: ['./app/**/*.tsx', './components/**/*.tsx'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    colors: {
      paper: 'var(--paper)',
      ink: 'var(--ink)',
      soft: 'var(--soft)',
      hair: 'var(--hair)',
      wash: 'var(--wash)',
      mark: 'var(--mark)',
      transparent: 'transparent',
      current: 'currentColor',
    },
    fontFamily: {
      sans: ['"Archivo Variable"', 'system-ui', 'sans-serif'],
      serif: ['"Source Serif 4 Variable"', 'Georgia', 'serif'],
      music: ['"Noto Music"', '"Archivo Variable"', 'sans-serif'],
      mono: ['ui-monospace', '"DejaVu Sans Mono"', 'monospace'],
    },
    borderRadius: { none: '0', DEFAULT: '2px' },
  },
};

export default config;
