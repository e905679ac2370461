import type { Config } from 'tailwindcss'

/** Petrol ink on cool grey and white; yellow for what is selected or to be done; hot and cold never by colour alone. */
export default {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    extend: {
      colors: {
        petrol: { DEFAULT: '#0C3F4D', light: '#13596B' },
        ink: '#10222C',
        dim: '#53646E',
        steel: '#EEF1F2',
        line: { DEFAULT: '#D6DDE0', light: '#E7ECEE' },
        mark: { DEFAULT: '#F2B705', pale: '#FFFDF0', soft: '#FFF5D6', ink: '#7A4F00' },
        hot: { DEFAULT: '#B8320F', pale: '#FBE9E2', ink: '#8E2410' },
        cold: { DEFAULT: '#1F6FA8', pale: '#E4F0F8', ink: '#12507D' },
        ok: { DEFAULT: '#2E7A4F', pale: '#E3F2E9' },
        reference: '#6A2C91',
      },
      fontFamily: {
        sans: ['"Atkinson Hyperlegible Next Variable"', 'system-ui', 'sans-serif'],
        mono: ['"Atkinson Hyperlegible Mono Variable"', 'ui-monospace', 'monospace'],
      },
    },
  },
} satisfies Config
