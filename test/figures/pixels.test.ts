import { Resvg } from '@resvg/resvg-js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { colorSteps, fieldPalette, hatchedFrom, negativeFrom } from '../../src/figures/draw/field-colors.ts';
import { colorOf, fieldPixels, hatchRow } from '../../src/figures/draw/field-image.ts';
import { indexedPng } from '../../src/figures/draw/indexed-png.ts';
import { areaBetween, pathOf, thinOut } from '../../src/figures/draw/trace.ts';

describe('a thinned curve', () => {
  it('keeps the extremes and the ends of every pixel, in their order', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1e3, max: 1e3, noNaN: true }), { minLength: 200, maxLength: 2000 }),
        fc.integer({ min: 10, max: 60 }),
        (drawn, pixels) => {
          // −0 and 0 are one place on the sheet
          const values = drawn.map((value) => value + 0);
          const along = Float64Array.from(values, (_, i) => (i * pixels) / values.length);
          const across = Float64Array.from(values);
          const thin = thinOut({ along, across });
          expect(thin.along.length).toBeLessThanOrEqual(Math.max(4 * (pixels + 1), 2 * pixels + 9));
          for (let pixel = 0; pixel < pixels; pixel++) {
            const inside = values.filter((_, i) => Math.floor(along[i]) === pixel);
            if (inside.length === 0) continue;
            const kept = Array.from(thin.across).filter((_, i) => Math.floor(thin.along[i]) === pixel);
            expect(Math.min(...kept)).toBe(Math.min(...inside));
            expect(Math.max(...kept)).toBe(Math.max(...inside));
            expect([kept[0], kept[kept.length - 1]]).toEqual([inside[0], inside[inside.length - 1]]);
          }
          expect(Array.from(thin.along)).toEqual(Array.from(thin.along).toSorted((a, b) => a - b));
        },
      ),
      { numRuns: 60 },
    );
  });

  it('is drawn over either axis, and closed where it bounds an area', () => {
    const points = { along: Float64Array.of(0, 10), across: Float64Array.of(1, 2.004) };
    expect(pathOf(points, false)).toBe('M0,1L10,2');
    expect(pathOf(points, true)).toBe('M1,0L2,10');
    const below = { along: points.along, across: Float64Array.of(5, 6) };
    expect(areaBetween(below, points, false)).toBe('M0,1L10,2L10,6L0,5Z');
  });
});

describe('the picture of a field', () => {
  const columns = [0, 1, 2];
  const positions = [0, 1, 2];

  it('has time to the right and position upwards', () => {
    const values = [
      [0.5, 0, 0],
      [0, 0, 1],
    ];
    const pixels = fieldPixels(values, columns, [0, 1], positions, 1, 4, 6);
    const at = (x: number, y: number) => pixels[4 * y + x];
    expect(at(0, 5)).toBe(colorSteps / 2);
    expect(at(0, 0)).toBe(0);
    expect(at(3, 0)).toBe(colorSteps);
    expect(at(3, 5)).toBe(0);
  });

  it('shows the strongest of the samples that share a pixel', () => {
    const times = Float64Array.from({ length: 1000 }, (_, j) => j);
    const values = Array.from(times, (_, j) => [0, j === 777 ? -1 : 0.1, 0]);
    const pixels = fieldPixels(values, columns, times, positions, 1, 10, 2);
    expect(Array.from(pixels).filter((color) => color > negativeFrom)).toHaveLength(1);
    expect(pixels.subarray(0, 10).findIndex((color) => color > negativeFrom)).toBe(7);
  });

  it('is empty of colour where the field is zero', () => {
    expect(new Set(fieldPixels([[0, 0, 0]], columns, [0], positions, 0, 7, 5))).toEqual(new Set([0]));
  });

  it('numbers colours by size and sign, and hatches negative ones only', () => {
    expect([0, 1, -1, 0.5, -0.5].map(colorOf)).toEqual([
      0,
      colorSteps,
      2 * colorSteps,
      colorSteps / 2,
      negativeFrom + colorSteps / 2,
    ]);
    const row = Uint8Array.from({ length: 12 }, (_, x) => colorOf(x < 6 ? -1 : 1));
    hatchRow(row, 2);
    expect(Array.from(row).filter((color) => color > hatchedFrom)).toHaveLength(1);
    expect(row[4]).toBe(hatchedFrom + colorSteps);
  });

  it.each(['light', 'dark'] as const)(
    'in %s tells size in grey by lightness and sign by hatching',
    (theme) => {
      const palette = fieldPalette(theme);
      const grey = (index: number) =>
        0.2126 * palette[3 * index] + 0.7152 * palette[3 * index + 1] + 0.0722 * palette[3 * index + 2];
      const away = theme === 'light' ? -1 : 1;
      for (const from of [0, negativeFrom]) {
        for (let step = 8; step <= colorSteps; step++) {
          expect(away * (grey(from + step) - grey(step === 8 ? 0 : from + step - 8))).toBeGreaterThan(0);
        }
      }
      for (let step = 10; step <= colorSteps; step++) {
        expect(Math.abs(grey(hatchedFrom + step) - grey(negativeFrom + step))).toBeGreaterThan(20);
      }
    },
  );

  it('is a PNG that a general decoder reads pixel by pixel', () => {
    const [width, height] = [37, 23];
    const palette = fieldPalette('light');
    const pixels = Uint8Array.from({ length: width * height }, (_, i) => (i * 7919) % (palette.length / 3));
    const png = indexedPng(pixels, width, height, palette).toString('base64');
    const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}"><image width="${width}" height="${height}" image-rendering="optimizeSpeed" href="data:image/png;base64,${png}"/></svg>`;
    const read = new Resvg(svg).render().pixels;
    const expected = Array.from(pixels).flatMap((index) => [
      ...palette.subarray(3 * index, 3 * index + 3),
      255,
    ]);
    expect(Array.from(read)).toEqual(expected);
  });
});
