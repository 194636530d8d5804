import { Resvg } from '@resvg/resvg-js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { layOutAxis } from '../../src/figures/frame/axis.ts';
import { escapeXml } from '../../src/figures/frame/sheet.ts';
import { dashes, palettes } from '../../src/figures/frame/theme.ts';
import { shorten, wrap } from '../../src/figures/text/fit-text.ts';
import { fontFile, textWidth } from '../../src/figures/text/font.ts';
import { formatQuantity, formatTicks } from '../../src/figures/text/format-values.ts';
import { outlineText } from '../../src/figures/text/outline-text.ts';
import { printedUnit, superscript } from '../../src/figures/text/units.ts';
import { roundedUp } from '../../src/figures/data/quantity-words.ts';

describe('the width of text', () => {
  it('is that of the renderer, which shapes the same font', () => {
    // ink of "|…|" begins and ends at the bars, so that blanks at the sides do not matter
    const bar = textWidth('|', 100);
    for (const text of [
      'displacement (mm)',
      '−0.25',
      '12.3 µm',
      'Verschiebung Äöü',
      '10⁻³/√kg',
      'WAVE m·s²',
    ]) {
      const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="4000" height="300"><text x="10" y="200" font-size="100" font-family="DejaVu Sans">|${escapeXml(text)}|</text></svg>`;
      const box = new Resvg(svg, {
        font: { fontFiles: [fontFile], loadSystemFonts: false, defaultFontFamily: 'DejaVu Sans' },
      }).getBBox();
      const ours = textWidth(text, 100) + bar;
      const ink = (box?.width ?? 0) - 0.09 * 100;
      // kerning may pull letters together; nothing may be wider than measured
      expect(ink / ours).toBeGreaterThan(0.95);
      expect(ink / ours).toBeLessThan(1.005);
    }
  });

  it('goes with outlines that cover the pixels that the renderer draws for the same font', () => {
    const text = '0123456789 ±−·µ°²³⁻⁶ abcdefghijklmnopqrstuvwxyz ABCDEFGHIJKLMNOPQRSTUVWXYZ ÄÖÜß §%&()≤√…';
    const font = { fontFiles: [fontFile], loadSystemFonts: false, defaultFontFamily: 'DejaVu Sans' };
    const ink = (svg: string) => new Resvg(svg, { font }).render().pixels;
    for (const character of text.replaceAll(' ', '')) {
      const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="60" height="60" font-family="DejaVu Sans"><text x="30" y="45" font-size="40" text-anchor="middle">${escapeXml(character)}</text></svg>`;
      const [theirs, ours] = [ink(svg), ink(outlineText(svg))];
      let [inked, differing] = [0, 0];
      for (let i = 3; i < theirs.length; i += 4) {
        if (theirs[i] > 0) inked++;
        if (Math.abs(theirs[i] - ours[i]) > 64) differing++;
      }
      expect({ character, inked: inked > 20, differing: differing <= 0.03 * inked }).toEqual({
        character,
        inked: true,
        differing: true,
      });
    }
  });

  it('limits what is shortened and wrapped', () => {
    fc.assert(
      fc.property(
        fc.string({ unit: 'grapheme', maxLength: 80 }),
        fc.integer({ min: 30, max: 300 }),
        (text, width) => {
          expect(textWidth(shorten(text, 11, width), 11)).toBeLessThanOrEqual(
            Math.max(width, textWidth('…', 11)),
          );
          for (const line of wrap(text, 11, width, 3)) expect(textWidth(line, 11)).toBeLessThanOrEqual(width);
          expect(wrap(text, 11, width, 3).length).toBeLessThanOrEqual(3);
        },
      ),
    );
  });
});

describe('a value with its unit', () => {
  it.each([
    [0.00045, 'm', '450 µm'],
    [21.6, 'm', '21.6 m'],
    [1e-12, 'm', '1 pm'],
    [1e12, 'm', '1 Tm'],
    [0.99996, 'm', '1 m'],
    [999.96, 'N', '1 kN'],
    [2.4e6, 'N', '2.4 MN'],
    [-0.0123, 'rad', '−12.3 mrad'],
    [0.0012, 's', '1.2 ms'],
    [86_400, 's', '86,400 s'],
    [5e9, 's', '5·10⁹ s'],
    [0.2, 'kg', '200 g'],
    [65_300, 'kg', '65.3 t'],
    [0, 'N·m', '0 N·m'],
    [1e-40, 'm', '100·10⁻⁴² m'],
    [0.31, '', '0.31'],
    [12.5, '%', '12.5 %'],
  ])('%d %s reads %s', (value, unit, text) => {
    expect(formatQuantity(value, unit)).toBe(text);
  });

  it('means the value, whatever its size', () => {
    const prefixes = 'yzafpnµm kMGTPEZY';
    fc.assert(
      fc.property(fc.double({ min: 1e-23, max: 1e26, noNaN: true }), (value) => {
        const match = /^([\d.,]+) ([yzafpnµmkMGTPEZY]?)N$/.exec(formatQuantity(value, 'N', 4));
        expect(match).not.toBeNull();
        const [, number, prefix] = match as RegExpExecArray;
        const power = prefix === '' ? 0 : 3 * (prefixes.indexOf(prefix) - 8);
        const read = Number(number.replaceAll(',', ''));
        expect(read).toBeGreaterThanOrEqual(1);
        expect(read).toBeLessThan(1000);
        expect(Math.abs((read * 10 ** power) / value - 1)).toBeLessThan(5.1e-4);
      }),
    );
  });

  it('has its unit printed from UCUM code', () => {
    expect(
      ['m/s2', 'N.m', 'rad/s2', '(m/s2)/(m/s2)', '(m)/(N)', '(m/s2)/(N)', '(Pa)/(m/s2)'].map(printedUnit),
    ).toEqual(['m/s²', 'N·m', 'rad/s²', '', 'm/N', '(m/s²)/N', 'Pa/(m/s²)']);
    expect(superscript(-12)).toBe('⁻¹²');
  });

  it('is rounded up where it is a bound', () => {
    expect(roundedUp(1.201e-5, 'm')).toBe('13 µm');
    fc.assert(
      fc.property(fc.double({ min: 1e-20, max: 1e20, noNaN: true }), (bound) => {
        const [, number, prefix] = /^([\d.,]+) (.?)N$/.exec(roundedUp(bound, 'N')) as RegExpExecArray;
        const power = prefix === '' ? 0 : 3 * ('yzafpnµm kMGTPEZY'.indexOf(prefix) - 8);
        expect(Number(number.replaceAll(',', '')) * 10 ** power).toBeGreaterThanOrEqual(bound * (1 - 1e-9));
      }),
    );
  });
});

describe('the labels of an axis', () => {
  const ends = fc.tuple(
    fc.double({ min: -1, max: 1, noNaN: true }),
    fc.double({ min: 0.01, max: 2, noNaN: true }),
    fc.integer({ min: -30, max: 30 }),
    fc.integer({ min: 40, max: 1500 }),
    fc.constantFrom('across' as const, 'upright' as const),
  );

  it('differ, are never a row of zeros and stand where they say', () => {
    fc.assert(
      fc.property(ends, ([start, span, power, length, direction]) => {
        const scale = Number(`1e${power}`);
        const spec = { name: 'displacement', unit: 'm', from: start * scale, to: (start + span) * scale };
        const { ticks, place } = layOutAxis(spec, 0, length, direction);
        const labels = ticks.map((tick) => tick.label);
        expect(new Set(labels).size).toBe(labels.length);
        for (const label of labels) expect(label).not.toMatch(/^−?0\.0*$/);
        const values = labels.map((label) => Number(label.replace('−', '-').replaceAll(',', '')));
        // evenly spaced numbers at evenly spaced places
        for (let i = 2; i < ticks.length; i++) {
          const numbers = (values[i] - values[0]) / (values[1] - values[0]);
          const places = (ticks[i].at - ticks[0].at) / (ticks[1].at - ticks[0].at);
          expect(numbers).toBeCloseTo(places, 6);
        }
        expect(place(spec.from)).toBeCloseTo(0, 6);
        expect(place(spec.to)).toBeCloseTo(length, 6);
        if (length > 120) expect(ticks.length).toBeGreaterThanOrEqual(2);
      }),
      { numRuns: 500 },
    );
  });

  it('give a range about zero a second number, in a low panel too', () => {
    for (let top = 0.5; top < 20; top *= 1.013) {
      for (const length of [45, 60, 100]) {
        const spec = { name: 'rotation', unit: 'rad', from: -top * 1e-3, to: 1.06e-3 * top };
        expect(layOutAxis(spec, length, 0, 'upright').ticks.length).toBeGreaterThanOrEqual(2);
      }
    }
  });

  it('are read from the start of a range that is narrow beside its distance from zero', () => {
    const axis = layOutAxis({ name: 'time', unit: 's', from: 1024, to: 1024.03125 }, 0, 500, 'across');
    expect(axis.title).toBe('time − 1,024 s (ms)');
    expect(axis.ticks.map(({ label }) => label)).toEqual(['0', '5', '10', '15', '20', '25', '30']);
  });

  it('of many decades have each a prefix of their own', () => {
    const spec = { name: 'bound', unit: 'm', from: 1e-7, to: 0.5, logarithmic: true };
    const { title, ticks, place } = layOutAxis(spec, 0, 700, 'across');
    expect(title).toBe('bound');
    expect(ticks.map(({ label }) => label)).toEqual([
      '100 nm',
      '1 µm',
      '10 µm',
      '100 µm',
      '1 mm',
      '10 mm',
      '100 mm',
    ]);
    expect(place(0)).toBe(0);
  });

  it('have the decimals that their step needs', () => {
    expect(formatTicks([0, 0.25, 0.5])).toEqual(['0', '0.25', '0.50']);
    expect(formatTicks([-0.2, -0.1, 0])).toEqual(['−0.2', '−0.1', '0']);
    expect(formatTicks([1000, 2000])).toEqual(['1,000', '2,000']);
    expect(formatTicks([])).toEqual([]);
  });
});

describe('the looks of a figure', () => {
  /** Contrast ratio of W3C, WCAG 2.2, "relative luminance" and "contrast ratio". */
  function contrast(a: string, b: string): number {
    const luminance = (color: string) => {
      const [red, green, blue] = [1, 3, 5]
        .map((at) => Number.parseInt(color.slice(at, at + 2), 16) / 255)
        .map((part) => (part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4));
      return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
    };
    const [light, dark] = [luminance(a), luminance(b)].toSorted((x, y) => y - x);
    return (light + 0.05) / (dark + 0.05);
  }

  it.each(['light', 'dark'] as const)(
    'in %s meet the contrast of WCAG 2.2 (1.4.3 text, 1.4.11 lines)',
    (theme) => {
      const { paper, ink, softInk, edge, lines } = palettes[theme];
      expect(contrast(ink, paper)).toBeGreaterThan(7);
      expect(contrast(softInk, paper)).toBeGreaterThan(4.5);
      expect(contrast(edge, paper)).toBeGreaterThan(3);
      for (const line of lines.slice(0, 3)) expect(contrast(line, paper)).toBeGreaterThan(3);
    },
  );

  it('tell lines apart without colour', () => {
    expect(new Set(dashes).size).toBe(dashes.length);
    expect(dashes.length).toBeGreaterThanOrEqual(palettes.light.lines.length);
  });

  it('hold no character that XML forbids', () => {
    expect(escapeXml(`<a href="x">&'</a>`)).toBe('&lt;a href=&quot;x&quot;&gt;&amp;&#39;&lt;/a&gt;');
    expect(escapeXml('a\u0000b\u001fc\ud800d\ufffee')).toBe('a b c d e');
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 40 }), (text) => {
        const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"><title>${escapeXml(text)}</title></svg>`;
        expect(() => new Resvg(svg)).not.toThrow();
      }),
    );
  });
});
