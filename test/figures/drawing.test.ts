import { Resvg } from '@resvg/resvg-js';
import { describe, expect, it } from 'vitest';
import { drawFigure, type FigureOptions } from '../../src/figures/draw-figure.ts';
import { Fault } from '../../src/faults/fault.ts';
import { rasterise } from '../../src/figures/rasterise.ts';
import { type View, viewsOf } from '../../src/figures/views.ts';
import { drawnTexts, findCollisions } from './drawn-text.ts';
import { allCases, type FigureCase } from './figure-cases.ts';

const cases = allCases();
const sizes = [
  [320, 240],
  [400, 300],
  [640, 360],
  [800, 1000],
  [1200, 700],
  [2000, 500],
] as const;

interface Drawn {
  readonly name: string;
  readonly svg: string;
}

/** Every view of every case that it can be shown as, in one size. */
function drawAll(width: number, height: number, theme: 'light' | 'dark' = 'light'): Drawn[] {
  return cases.flatMap((each) =>
    viewsOf[each.operation].flatMap((view) => {
      const svg = drawn(each, { view, width, height, theme });
      return svg === null ? [] : [{ name: `${each.name} ${view} ${width}×${height}`, svg }];
    }),
  );
}

function drawn({ operation, request, answer }: FigureCase, options: FigureOptions): string | null {
  try {
    return drawFigure(operation, request, answer, options);
  } catch (error) {
    if (error instanceof Fault) return null;
    throw error;
  }
}

describe('a figure', () => {
  it.each(sizes)('of %i × %i px keeps its words apart and on the sheet', (width, height) => {
    const figures = drawAll(width, height);
    expect(figures.length).toBeGreaterThan(80);
    const found = figures.flatMap(({ name, svg }) => findCollisions(svg).map((each) => `${name}: ${each}`));
    expect(found).toEqual([]);
  });

  it('is well-formed XML that a strict parser draws, whatever the names hold', () => {
    for (const { svg } of drawAll(400, 300)) expect(() => new Resvg(svg)).not.toThrow();
    const shown = drawAll(1200, 700).filter(({ svg }) => svg.includes('stay &lt;A&amp;B&gt;'));
    expect(shown.length).toBeGreaterThan(0);
    expect(() => new Resvg('<svg xmlns="http://www.w3.org/2000/svg"><text>a < b</text></svg>')).toThrow();
  });

  it('refers to nothing outside itself and holds no ids, scripts or styles of a page', () => {
    for (const { svg } of drawAll(640, 360)) {
      expect(svg).toMatch(/^<svg xmlns="http:\/\/www\.w3\.org\/2000\/svg" role="img"/);
      expect(svg).toMatch(/<title>[^<]{10,}<\/title><desc>[^<]{10,}<\/desc>/);
      const own = svg.replace('xmlns="http://www.w3.org/2000/svg"', '').replace(/base64,[^"]*/g, '');
      expect(own).not.toMatch(/https?:|<script|style|<a |\bid=|\son\w+=|url\(|NaN|Infinity|undefined/);
    }
  });

  it('reads no tick as a row of zeros', () => {
    const labels = drawAll(800, 1000).flatMap(({ svg }) => drawnTexts(svg).map(({ text }) => text));
    expect(labels.length).toBeGreaterThan(2000);
    expect(labels.filter((label) => /^[−-]?0\.0+$/.test(label))).toEqual([]);
  });

  it('is the same string for the same answer', () => {
    expect(drawAll(640, 360, 'dark')).toEqual(drawAll(640, 360, 'dark'));
  });

  it('says member, verdict and number of modes', () => {
    const { svg } = drawAll(1200, 700).find(({ name }) => name.startsWith('pull-64-modes envelope')) as Drawn;
    expect(drawnTexts(svg).map(({ text }) => text)).toContain('Cable, 45 m · irregular-data · 64 modes');
  });

  it('stays small however long the answer is', () => {
    const large = drawAll(1200, 700).filter(({ svg }) => svg.length > 200_000);
    expect(large.map(({ name }) => name)).toEqual([]);
  });

  it('is refused where the answer cannot be shown so, with what to ask for instead', () => {
    const refusal = (name: string, view: View, extra: Partial<FigureOptions> = {}) => {
      const each = cases.find((one) => one.name === name) as FigureCase;
      try {
        drawFigure(each.operation, each.request, each.answer, {
          view,
          width: 640,
          height: 360,
          theme: 'light',
          ...extra,
        });
      } catch (error) {
        return (error as Fault).records.map(({ code, detail }) => `${code}: ${detail}`).join();
      }
      return 'drawn';
    };
    expect(refusal('modes-2000', 'shapes')).toMatch(/^figure-without-shapes: .*"frequencies"/);
    expect(refusal('modes-1', 'shapes', { modes: [2] })).toMatch(/^figure-mode-not-solved: Mode 2 .* 1 to 1/);
    expect(refusal('modes-1', 'history')).toMatch(
      /^figure-not-of-operation: .* the views shapes, frequencies/,
    );
    expect(refusal('zeros', 'convergence')).toMatch(/^figure-without-energy: .*"envelope"/);
    expect(refusal('pull-loose', 'force-history')).toMatch(
      /^figure-quantity-not-sampled: .*Add "force".*"history"/,
    );
    expect(refusal('few-samples', 'history', { stations: [31] })).toMatch(
      /^figure-station-outside: .*31 m.*7\.5 m to 30 m/,
    );
    expect(refusal('pull-loose', 'snapshots', { instants: [1.21] })).toMatch(
      /^figure-instant-outside: .*1\.21 s.*0 s to 1\.2 s/,
    );
    expect(refusal('zeros', 'history', { width: 319 })).toMatch(/^figure-size: .*319 px.*320 to 4096/);
    expect(refusal('zeros', 'history', { height: 400.5 })).toMatch(/^figure-size: /);
    expect(refusal('zeros', 'history', { stations: [0, 45], width: 320 })).toBe('drawn');
    expect(refusal('zeros', 'history', { stations: [] })).toBe('drawn');
    expect(refusal('modes-1', 'shapes', { modes: [0] })).toMatch(/^figure-mode-not-solved: Mode 0 /);
    expect(refusal('zeros', 'snapshots', { instants: [Number.NaN] })).toMatch(/^figure-instant-outside: /);
  });
});

describe('a picture', () => {
  const { svg } = drawAll(640, 360).find(({ name }) => name.startsWith('stay-cable-release env')) as Drawn;

  it('is a PNG of the size of the figure', () => {
    const png = Buffer.from(rasterise(svg));
    expect(png.subarray(1, 4).toString()).toBe('PNG');
    expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([640, 360]);
    expect(rasterise(svg)).toEqual(rasterise(svg));
  });

  it('shows every word of the figure', () => {
    const pixelsOf = (each: string) => {
      const picture = `<svg xmlns="http://www.w3.org/2000/svg" width="640" height="360"><image width="640" height="360" href="data:image/png;base64,${Buffer.from(rasterise(each)).toString('base64')}"/></svg>`;
      return new Resvg(picture).render().pixels;
    };
    const whole = pixelsOf(svg);
    const wordless = pixelsOf(svg.replace(/<text.*?<\/text>/g, ''));
    const missing = drawnTexts(svg).filter(({ left, right, top, bottom }) => {
      let differing = 0;
      for (let y = Math.floor(top); y < bottom; y++) {
        for (let x = Math.max(0, Math.floor(left)); x < Math.min(right, 640); x++) {
          const at = 4 * (y * 640 + x);
          if (Math.abs(whole[at] - wordless[at]) > 60) differing++;
        }
      }
      return differing <= 3;
    });
    expect(missing).toEqual([]);
  });
});
