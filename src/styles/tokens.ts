/**
 * The one place colours come from: Tailwind reads it (tailwind.config.ts), and so do plots and documents.
 * Every text colour stands at 4.5:1 or more on paper, sheet, soft and its own soft ground, in both themes.
 */
export const light = {
  paper: '#FAF7F1',
  sheet: '#FFFFFF',
  soft: '#F1ECE2',
  ink: '#23201B',
  muted: '#6A6256',
  line: '#DED6C7',
  /** Boundary of anything one can type or click into: 3:1 against its surroundings. */
  edge: '#918775',
  barn: '#9E2B25',
  'barn-soft': '#F6E3DE',
  straw: '#8A5A00',
  'straw-soft': '#F8EBCB',
  field: '#256047',
  'field-soft': '#DFEEE5',
  slate: '#2F5570',
  'slate-soft': '#E1EBF1',
  /** Errors: mulberry, so that a fault is never mistaken for the primary action. */
  fault: '#8A1D5E',
  'fault-soft': '#F8E4EE',
} as const;

export type ColourRole = keyof typeof light;
export type Palette = Readonly<Record<ColourRole, string>>;

export const dark: Palette = {
  paper: '#161412',
  sheet: '#1E1B18',
  soft: '#262219',
  ink: '#EDE6DA',
  muted: '#ABA191',
  line: '#3A342C',
  edge: '#7A7060',
  barn: '#EB8571',
  'barn-soft': '#3B211D',
  straw: '#E6B653',
  'straw-soft': '#382C14',
  field: '#86C6A4',
  'field-soft': '#1B2F25',
  slate: '#97BDD6',
  'slate-soft': '#1C2B36',
  fault: '#F09AC4',
  'fault-soft': '#3A1E2E',
};

export const palettes = { light, dark } satisfies Record<string, Palette>;
export type ThemeName = keyof typeof palettes;

/** Curves in the order they are drawn: told apart by hue for the colour-blind, and by dash without any hue. */
export const series: ReadonlyArray<{ role: ColourRole; dash: readonly number[] }> = [
  { role: 'barn', dash: [] },
  { role: 'slate', dash: [8, 4] },
  { role: 'straw', dash: [2, 4] },
  { role: 'field', dash: [10, 4, 2, 4] },
  { role: 'fault', dash: [5, 2] },
  { role: 'ink', dash: [1, 3] },
  { role: 'muted', dash: [12, 3, 2, 3, 2, 3] },
  { role: 'edge', dash: [4, 8] },
];

export const fonts = {
  // Superscripts and subscripts of their own (styles/fonts.css); Source Sans stands in for the few other signs Plex Mono lacks.
  sans: '"Source Sans 3 Variable", "Tallybarn Scripts", system-ui, sans-serif',
  display: '"Fraunces Variable", "Tallybarn Scripts", Georgia, serif',
  mono: '"Tallybarn Superscripts", "IBM Plex Mono", "Tallybarn Scripts", "Source Sans 3 Variable", ui-monospace, monospace',
} as const;

export const radius = '6px';
/** Only for what floats above the page: dialogs, menus, messages. */
export const shadow = '0 8px 28px rgb(20 14 8 / 0.22)';
