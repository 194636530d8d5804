import type { View } from './views.ts';

/** What is drawn, and how large. */
export interface FigureOptions {
  readonly view: View;
  /** px */
  readonly width: number;
  /** px */
  readonly height: number;
  readonly theme: 'light' | 'dark';
  /** m */
  readonly stations?: readonly number[];
  /** s */
  readonly instants?: readonly number[];
  /** Orders, from 1. */
  readonly modes?: readonly number[];
}

/** An empty frame that names its view: the drawing itself is made elsewhere and replaces this file. */
export function drawFigure(
  operation: 'modes' | 'responses' | 'transfer-functions',
  _request: unknown,
  answer: unknown,
  { view, width, height, theme }: FigureOptions,
): string {
  const ground = theme === 'light' ? '#fff' : '#111';
  const size = JSON.stringify(answer).length;
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}"><title>${operation}: ${view}, ${size}</title><rect width="100%" height="100%" fill="${ground}"/></svg>`;
}
