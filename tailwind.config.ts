import type { Config } from 'tailwindcss'

/**
 * The look as tokens: paper, ink, pen and straw. The values live as CSS variables in web/app/theme.css
 * so that the sun variant can exchange them; Tailwind only gives them names.
 */
export default {
  content: ['./index.html', './web/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      white: '#fff',
      paper: 'var(--paper)',
      leaf: 'var(--leaf)',
      board: 'var(--board)',
      ink: 'var(--ink)',
      graphite: 'var(--graphite)',
      pen: 'var(--pen)',
      straw: 'var(--straw)',
      'straw-pale': 'var(--straw-pale)',
      'straw-deep': 'var(--straw-deep)',
      line: 'var(--line)',
      feint: 'var(--feint)',
    },
    fontFamily: { sans: 'var(--face)', mono: 'var(--face-figures)' },
    fontSize: {
      '1': '12.5px',
      '0': '15px',
      '2': '18px',
      '3': '21.5px',
      '4': '26px',
      '5': '31px',
      '6': '44px',
      '7': '76px',
      '8': '132px',
    },
    borderRadius: { none: '0' },
  },
} satisfies Config
