import { fontFamily } from '../text/font.ts';
import { palettes, type Palette, type Theme } from './theme.ts';

export type Anchor = 'start' | 'middle' | 'end';

/** A rectangle of the sheet, px, y downwards. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** How a line or an area looks. */
export interface Stroke {
  readonly color: string;
  readonly width?: number;
  readonly dash?: string;
  readonly opacity?: number;
  readonly join?: 'round' | 'miter';
}

const entities: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/**
 * Text as XML may hold it: markup escaped; control characters and lone surrogates, which XML 1.0
 * (section 2.2) forbids, replaced.
 */
export function escapeXml(text: string): string {
  return text
    .replace(/[^\u0020-\u007e\u00a0-\ufffd\u{10000}-\u{10ffff}]|\p{Surrogate}/gu, ' ')
    .replace(/[&<>"']/g, (character) => entities[character]);
}

/** A coordinate with at most two decimals. */
export function px(value: number): string {
  const rounded = Math.round(value * 100) / 100;
  return rounded === 0 ? '0' : String(rounded);
}

/**
 * The paper that a figure is drawn on: collects SVG elements in their order. It uses no ids, so that
 * several figures may stand in one page, and refers to nothing outside itself.
 */
export class Sheet {
  readonly width: number;
  readonly height: number;
  readonly palette: Palette;
  private readonly parts: string[] = [];

  constructor(width: number, height: number, theme: Theme) {
    this.width = width;
    this.height = height;
    this.palette = palettes[theme];
  }

  text(x: number, y: number, text: string, size: number, look: TextLook = {}): void {
    const anchor =
      look.anchor === undefined || look.anchor === 'start' ? '' : ` text-anchor="${look.anchor}"`;
    const fill = look.color === undefined ? '' : ` fill="${look.color}"`;
    const halo =
      look.halo === true ? ` stroke="${this.palette.paper}" stroke-width="3" paint-order="stroke"` : '';
    this.parts.push(
      `<text x="${px(x)}" y="${px(y)}" font-size="${size}"${anchor}${fill}${halo}>${escapeXml(text)}</text>`,
    );
  }

  line(x1: number, y1: number, x2: number, y2: number, stroke: Stroke): void {
    this.path(`M${px(x1)} ${px(y1)}L${px(x2)} ${px(y2)}`, stroke);
  }

  path(data: string, stroke: Stroke): void {
    if (data === '') return;
    const { color, width = 1, dash = '', opacity = 1, join = 'miter' } = stroke;
    this.parts.push(
      `<path d="${data}" fill="none" stroke="${color}" stroke-width="${width}"` +
        (dash === '' ? '' : ` stroke-dasharray="${dash}"`) +
        (opacity === 1 ? '' : ` stroke-opacity="${opacity}"`) +
        (join === 'miter' ? '' : ' stroke-linejoin="round"') +
        '/>',
    );
  }

  area(data: string, color: string, opacity = 1): void {
    if (data === '') return;
    this.parts.push(
      `<path d="${data}" fill="${color}"${opacity === 1 ? '' : ` fill-opacity="${opacity}"`}/>`,
    );
  }

  circle(x: number, y: number, radius: number, fill: string): void {
    this.parts.push(`<circle cx="${px(x)}" cy="${px(y)}" r="${radius}" fill="${fill}"/>`);
  }

  image(box: Box, base64: string): void {
    this.parts.push(
      `<image x="${px(box.x)}" y="${px(box.y)}" width="${px(box.width)}" height="${px(box.height)}" ` +
        `preserveAspectRatio="none" image-rendering="optimizeSpeed" ` +
        `href="data:image/png;base64,${base64}"/>`,
    );
  }

  /** The whole figure; title and description are what a screen reader says. */
  finish(title: string, description: string): string {
    return (
      `<svg xmlns="http://www.w3.org/2000/svg" role="img" width="${this.width}" height="${this.height}" ` +
      `viewBox="0 0 ${this.width} ${this.height}" font-family="${fontFamily}" fill="${this.palette.ink}">` +
      `<title>${escapeXml(title)}</title><desc>${escapeXml(description)}</desc>` +
      `<path d="M0 0H${this.width}V${this.height}H0Z" fill="${this.palette.paper}"/>` +
      `${this.parts.join('')}</svg>\n`
    );
  }
}

/** Where text hangs and how it looks. */
export interface TextLook {
  readonly anchor?: Anchor;
  readonly color?: string;
  /** Kept clear of lines below it. */
  readonly halo?: boolean;
}
