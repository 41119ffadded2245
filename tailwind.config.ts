import type { Config } from 'tailwindcss'
import plugin from 'tailwindcss/plugin'
import { type Palette, dark, light, tokens } from './assets/look/palette'

/** `#28506e` as `40 80 110`, so that Tailwind can lay an opacity over a variable. */
function channels(hex: string): string {
  return [1, 3, 5].map(start => parseInt(hex.slice(start, start + 2), 16)).join(' ')
}

function variables(palette: Palette): Record<string, string> {
  return Object.fromEntries(tokens.map(token => [`--${token}`, channels(palette[token])]))
}

const colours = Object.fromEntries(tokens.map(token => [token, `rgb(var(--${token}) / <alpha-value>)`]))

const schemes = plugin(({ addBase }) => {
  addBase({
    ':root': { ...variables(light), 'color-scheme': 'light' },
    '@media screen and (prefers-color-scheme: dark)': { ':root:not([data-scheme="light"])': { ...variables(dark), 'color-scheme': 'dark' } },
    '@media screen': { ':root[data-scheme="dark"]': { ...variables(dark), 'color-scheme': 'dark' } },
  })
})

/** Colours, sizes, corners and widths are replaced, not extended: what the look does not name cannot be written. */
export default {
  content: [],
  plugins: [schemes],
  theme: {
    colors: { ...colours, transparent: 'transparent', current: 'currentColor', inherit: 'inherit' },
    screens: { tablet: '834px', laptop: '1200px', wide: '1800px' },
    fontFamily: { sans: ['"Atkinson Hyperlegible"', '"Noto Sans"', '"DejaVu Sans"', 'sans-serif'] },
    fontSize: {
      'fine': ['0.875rem', '1.25'],
      'body': ['1.0625rem', '1.4'],
      'lead': ['1.3125rem', '1.25'],
      'title': ['1.625rem', '1.2'],
      // The handling sheet, read at three metres on a ten-inch tablet: 29, 34 and 38 px.
      'sheet': ['1.8125rem', '1.15'],
      'sheet-name': ['2.125rem', '1.15'],
      'sheet-title': ['2.375rem', '1.1'],
    },
    borderRadius: { none: '0', DEFAULT: '2px', key: '3px' },
    boxShadow: { none: 'none' },
    extend: {
      minHeight: { touch: '2.75rem', act: '3.625rem', bench: '5.5rem' },
      minWidth: { touch: '2.75rem', act: '3.625rem', bench: '5.5rem' },
      borderWidth: { 3: '3px', plank: '7px' },
      outlineWidth: { 3: '3px' },
      maxWidth: { words: '42rem', page: '90rem' },
    },
  },
} satisfies Config
