import type { Config } from 'tailwindcss';

/** Colour names stand for the variables in src/index.css, which change with the theme. */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  theme: {
    extend: {
      colors: {
        ground: 'var(--ground)',
        sheet: 'var(--sheet)',
        ink: 'var(--ink)',
        'ink-soft': 'var(--ink-soft)',
        rule: 'var(--rule)',
        pencil: 'var(--pencil)',
        signal: 'var(--signal)',
        'signal-text': 'var(--signal-text)',
        'on-signal': 'var(--on-signal)',
        clear: 'var(--clear)',
        caution: 'var(--caution)',
        focus: 'var(--focus)',
      },
      fontFamily: {
        sans: ["'Commissioner Variable'", 'system-ui', 'sans-serif'],
        mono: ["'JetBrains Mono Variable'", 'ui-monospace', 'monospace'],
      },
      borderRadius: { DEFAULT: '2px' },
    },
  },
} satisfies Config;
