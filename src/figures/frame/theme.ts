/** Whether a figure is drawn dark on light or light on dark. */
export type Theme = 'light' | 'dark';

/** The colours of a figure. */
export interface Palette {
  readonly paper: string;
  /** Text and the member. */
  readonly ink: string;
  /** Tick labels, notes, less important words. */
  readonly softInk: string;
  /** Frame of a plot. */
  readonly edge: string;
  readonly grid: string;
  /** Line colours in the order of use. */
  readonly lines: readonly string[];
}

/**
 * Lines: the colours of M. Okabe, K. Ito, "Color universal design", 2008, in an order in which those next
 * to each other also differ in lightness; on dark paper without its darkest.
 */
export const palettes: Readonly<Record<Theme, Palette>> = {
  light: {
    paper: '#ffffff',
    ink: '#1a1f24',
    softInk: '#4a545e',
    edge: '#8a949e',
    grid: '#e4e8eb',
    lines: ['#0072b2', '#d55e00', '#009e73', '#cc79a7', '#e69f00', '#56b4e9', '#1a1f24'],
  },
  dark: {
    paper: '#14191e',
    ink: '#eef1f3',
    softInk: '#b4bec7',
    edge: '#6b7680',
    grid: '#2a3238',
    lines: ['#56b4e9', '#e69f00', '#2fc59a', '#e39ac0', '#f0e442', '#d55e00', '#eef1f3'],
  },
};

/** Dash patterns that go with the line colours, so that lines differ in grey too. */
export const dashes: readonly string[] = ['', '7 3', '2 2.5', '9 3 2 3', '4 2', '12 4', '1.5 4'];

/** Sizes of text, px. */
export const sizes = { title: 14, body: 11.5, tick: 10.5 } as const;
