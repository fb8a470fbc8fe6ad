import type { Config } from 'tailwindcss'

const token = (name: string) => `rgb(var(--${name}) / <alpha-value>)`

/** The drafting sheet: colours are tokens of app/assets/css/sheet.css, so that one class serves both sheets. */
export default {
  content: [],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: token('paper'),
      raised: token('raised'),
      sunken: token('sunken'),
      ink: token('ink'),
      muted: token('muted'),
      hairline: token('hairline'),
      vermilion: token('vermilion'),
      teal: token('teal'),
      wash: token('wash'),
    },
    fontFamily: {
      mono: ['"JetBrains Mono"', 'ui-monospace', 'monospace'],
      sans: ['system-ui', '-apple-system', '"Segoe UI"', '"Noto Sans"', 'sans-serif'],
    },
    borderRadius: { none: '0', full: '9999px' },
    boxShadow: { none: 'none' },
  },
} satisfies Config
