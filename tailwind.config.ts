import type { Config } from 'tailwindcss';
import plugin from 'tailwindcss/plugin';
import { fonts, light, palettes, radius, shadow, type Palette } from './src/styles/tokens.ts';

/** Custom properties of one palette; `color-scheme` makes the browser's own controls follow. */
function declarations(palette: Palette, scheme: 'light' | 'dark'): Record<string, string> {
  const colours = Object.entries(palette).map(([role, value]) => [`--${role}`, value] as const);
  return { ...Object.fromEntries(colours), 'color-scheme': scheme };
}

/** Without a chosen theme the system decides, so that the first paint is right before any script has run. */
const themes = plugin((tailwind) => {
  tailwind.addBase({
    ':root': declarations(palettes.light, 'light'),
    '@media (prefers-color-scheme: dark)': {
      ':root:not([data-theme=light])': declarations(palettes.dark, 'dark'),
    },
    ':root[data-theme=dark]': declarations(palettes.dark, 'dark'),
    '@media print': { ':root:root:root': declarations(palettes.light, 'light') },
  });
});

const roles = Object.fromEntries(Object.keys(light).map((role) => [role, `var(--${role})`]));

export default {
  content: [],
  theme: {
    colors: { ...roles, transparent: 'transparent', current: 'currentColor' },
    fontFamily: fonts,
    fontSize: {
      xs: ['0.8125rem', '1.125rem'],
      sm: ['0.875rem', '1.25rem'],
      base: ['0.9375rem', '1.375rem'],
      lg: ['1.0625rem', '1.5rem'],
      xl: ['1.25rem', '1.625rem'],
      '2xl': ['1.6875rem', '2rem'],
    },
    fontWeight: { normal: '400', medium: '500', semibold: '600', bold: '700' },
    borderRadius: { none: '0', DEFAULT: radius, full: '9999px' },
    boxShadow: { none: 'none', DEFAULT: shadow },
  },
  plugins: [themes],
} satisfies Config;
