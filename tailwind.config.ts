import type { Config } from 'tailwindcss'

/** Tokens live as custom properties in app/assets/css/tokens.css; this only gives them utility names. */
export default {
  content: ['./app/**/*.{vue,ts}', './formkit.config.ts'],
  theme: {
    screens: { sm: '641px', md: '981px', lg: '1181px' },
    colors: {
      transparent: 'transparent', current: 'currentColor', white: '#fff',
      paper: 'var(--paper)', sheet: 'var(--sheet)', bench: 'var(--bench)', ink: 'var(--ink)', graphite: 'var(--graphite)',
      edge: 'var(--edge)', rule: 'var(--rule)',
      steel: { DEFAULT: 'var(--steel)', deep: 'var(--steel-deep)', wash: 'var(--steel-wash)' },
      caution: { DEFAULT: 'var(--caution)', wash: 'var(--caution-wash)' },
      stop: { DEFAULT: 'var(--stop)', wash: 'var(--stop-wash)' },
      sound: { DEFAULT: 'var(--sound)', wash: 'var(--sound-wash)' },
    },
    fontFamily: { sans: ['Work Sans', 'sans-serif'] },
    fontSize: {
      12: ['0.75rem', '1'], 13: ['0.8125rem', '1.35'], 14: ['0.875rem', '1.45'], 16: ['1rem', '1.5'], 20: ['1.25rem', '1.2'],
      25: ['1.5625rem', '1.2'], 31: ['1.9375rem', '1.2'], 39: ['2.4375rem', '1.15'], 49: ['3.0625rem', '1.1'], 128: ['8rem', '1'],
    },
    borderRadius: { DEFAULT: '2px', none: '0' },
    boxShadow: {},
    extend: {},
  },
  corePlugins: { preflight: false },
} satisfies Config
