import type { Config } from 'tailwindcss'

/**
 * The one place for tokens. Colours are CSS variables (assets/css/main.css) so that light and dark share every class;
 * they are named after dyestuffs and workroom matter. `accent` roles: woad acts, weld cautions, madder stops, verdigris holds.
 */
const dye = (name: string) => `rgb(var(--${name}) / <alpha-value>)`

export default {
  content: ['./app.vue', './error.vue', './pages/**/*.vue', './layouts/**/*.vue', './components/**/*.{vue,ts}', './composables/**/*.ts'],
  darkMode: 'media',
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      chalk: dye('chalk'),
      selvage: { DEFAULT: dye('selvage'), deep: dye('selvage-deep') },
      thread: dye('thread'),
      oakgall: dye('oakgall'),
      walnut: dye('walnut'),
      woad: { DEFAULT: dye('woad'), pale: dye('woad-pale'), ink: dye('woad-ink') },
      weld: { DEFAULT: dye('weld'), pale: dye('weld-pale'), ink: dye('weld-ink') },
      madder: { DEFAULT: dye('madder'), pale: dye('madder-pale'), ink: dye('madder-ink') },
      verdigris: { DEFAULT: dye('verdigris'), pale: dye('verdigris-pale') },
    },
    borderRadius: { none: '0', DEFAULT: '2px', full: '9999px' },
    fontFamily: { sans: ['Inter', 'system-ui', 'sans-serif'] },
    /* a scale of 1.2 from 15 px */
    fontSize: {
      xs: ['0.78125rem', { lineHeight: '1.125rem' }],
      sm: ['0.875rem', { lineHeight: '1.25rem' }],
      base: ['0.9375rem', { lineHeight: '1.375rem' }],
      lg: ['1.125rem', { lineHeight: '1.5rem' }],
      xl: ['1.35rem', { lineHeight: '1.75rem' }],
      '2xl': ['1.62rem', { lineHeight: '2rem' }],
      '3xl': ['1.944rem', { lineHeight: '2.375rem' }],
    },
    fontWeight: { normal: '400', label: '400', figure: '600', semibold: '600' },
    extend: {
      screens: { tablet: '768px', laptop: '1200px', wide: '1440px' },
      minHeight: { touch: '44px' },
      minWidth: { touch: '44px' },
      transitionDuration: { DEFAULT: '120ms' },
    },
  },
} satisfies Config
