import type { Config } from 'tailwindcss'

/** The palette, type and space of Wherefore; text and background pairs meet WCAG 2.2 AA. */
export default {
  content: ['./app.vue', './error.vue', './pages/**/*.vue', './layouts/**/*.vue', './components/**/*.vue'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      white: '#ffffff',
      ink: { DEFAULT: '#16202a', 2: '#3b4954', 3: '#5c6a75' },
      paper: '#f6f5f1',
      sheet: '#ffffff',
      rule: { DEFAULT: '#dcd9d0', 2: '#ebe9e3' },
      edge: '#86827a',
      tide: { DEFAULT: '#0c4f5b', 2: '#0f6573', 1: '#dcebec' },
      flare: { DEFAULT: '#e39a1c', text: '#8a4c05', 1: '#fcf0da' },
      ask: { DEFAULT: '#5a4a9c', 1: '#ebe8f6' },
      stop: { DEFAULT: '#9c2a20', 1: '#f8e4e1' },
      clear: { DEFAULT: '#2d6a3f', 1: '#e2efe4' },
    },
    fontFamily: {
      sans: ['"Public Sans"', 'ui-sans-serif', 'system-ui', 'sans-serif'],
    },
    fontSize: {
      small: ['0.8125rem', { lineHeight: '1.2rem' }],
      body: ['0.9375rem', { lineHeight: '1.45rem' }],
      legend: ['1.03125rem', { lineHeight: '1.45rem' }],
      section: ['1.25rem', { lineHeight: '1.6rem' }],
      sentence: ['1.5625rem', { lineHeight: '1.9rem', letterSpacing: '-0.015em' }],
      headline: ['1.9375rem', { lineHeight: '2.3rem', letterSpacing: '-0.015em' }],
      letter: ['1.125rem', { lineHeight: '1.75rem' }],
    },
    borderRadius: { none: '0', control: '6px', choice: '8px', sheet: '10px', full: '9999px' },
    boxShadow: { none: 'none', sheet: '0 14px 34px -18px rgb(22 32 42 / 0.28)' },
    // Else `shadow-sheet` would also color the shadow with the palette's white `sheet`.
    boxShadowColor: {},
    extend: {},
  },
} satisfies Config
