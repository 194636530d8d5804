import { describe, expect, it } from 'vitest';
import { evenGrid, HarmonicTable } from '../../src/numerics/harmonic-table.ts';

const EPS = Number.EPSILON;

/**
 * rate, start, step, j, cos and sin of rate·(start + j·step), the doubles taken as exact
 * (mpmath: mp.dps = 60; a = mpf(rate)*(mpf(start) + j*mpf(step)); cos(a), sin(a)).
 */
const EXACT: readonly (readonly [number, number, number, number, number, number])[] = [
  [1, 0, 0.01, 17, 0.9855847669095607085732, 0.1691823490669960136454],
  [1, 0, 0.01, 399, -0.6611788377748800043572, -0.7502283282299188882107],
  [6.283185307179586, 0, 0.0025, 17, 0.9645574184577980949403, 0.2638730499653728922815],
  [6.283185307179586, 0, 0.0025, 399, 0.9998766324816605968506, -0.01570731731182078958821],
  [628.3185307179587, 1e3, 0.001, 0, 1, 3.928773447456943890324e-12],
  [628.3185307179587, 1e3, 0.001, 1, 0.8090169943726381390131, 0.5877852522956515874147],
  [628.3185307179587, 1e3, 0.001, 399, 0.8090169943772606880836, -0.5877852522892891944475],
  [1e6, 1e3, 1e-7, 1, 0.7792078189773935275957, 0.6267656458713204864277],
  [1e6, 1e3, 1e-7, 399, -0.9347260005787953721804, 0.3553692499949451641518],
  [12345.678, 1e5, 0.125, 17, -0.385035511827419286433, 0.9229017578441365515121],
  [12345.678, 1e5, 0.125, 399, 0.6999512317269089982528, 0.7141906420585353358383],
];

describe('cosines and sines', () => {
  it.each(EXACT)('rate %s, start %s, step %s, entry %i agree with 22-digit values', (...row) => {
    const [rate, start, step, j, cosExpected, sinExpected] = row;
    const cosine = new Float64Array(400);
    const sine = new Float64Array(400);
    new HarmonicTable().fill(rate, start, step, 400, cosine, sine);
    // two library values multiplied, and the rounding of the two angles
    const tolerance = EPS * (4 + 1.5 * rate * (start + j * step));
    expect(Math.abs(cosine[j] - cosExpected)).toBeLessThan(tolerance);
    expect(Math.abs(sine[j] - sinExpected)).toBeLessThan(tolerance);
  });

  it('stay within three roundings and those of the angle of the library values, for any count', () => {
    const table = new HarmonicTable();
    for (const count of [1, 2, 3, 8, 99, 100, 101, 2048, 5000]) {
      for (const [rate, start, step] of [
        [1, 0, 0.37],
        [250, -3, 1e-4],
        [0, 1, 1],
      ]) {
        const cosine = new Float64Array(count);
        const sine = new Float64Array(count);
        table.fill(rate, start, step, count, cosine, sine);
        let worst = 0;
        for (let j = 0; j < count; j++) {
          const angle = rate * (start + j * step);
          const tolerance = EPS * (4 + 2 * (rate * Math.abs(start) + rate * j * step));
          worst = Math.max(worst, Math.abs(cosine[j] - Math.cos(angle)) / tolerance);
          worst = Math.max(worst, Math.abs(sine[j] - Math.sin(angle)) / tolerance);
        }
        expect(worst).toBeLessThan(1);
      }
    }
  });

  it('keep cos² + sin² = 1 within some roundings at the last of a million entries', () => {
    const count = 1e6;
    const cosine = new Float64Array(count);
    const sine = new Float64Array(count);
    new HarmonicTable().fill(1.7, 0, 1, count, cosine, sine);
    for (let j = 0; j < count; j += 9973) {
      expect(Math.abs(cosine[j] ** 2 + sine[j] ** 2 - 1)).toBeLessThan(6 * EPS);
    }
  });

  it('are written from the offset on and nowhere else', () => {
    const cosine = new Float64Array(30).fill(7);
    const sine = new Float64Array(30).fill(7);
    new HarmonicTable().fill(1, 0, 0, 10, cosine, sine, 12);
    expect(Array.from(cosine)).toEqual([
      ...Array.from({ length: 12 }, () => 7),
      ...Array.from({ length: 10 }, () => 1),
      ...Array.from({ length: 8 }, () => 7),
    ]);
    expect(Array.from(sine.subarray(12, 22))).toEqual(Array.from({ length: 10 }, () => 0));
  });
});

describe('even grids', () => {
  it('are recognised within rounding of their largest value', () => {
    const grid = Float64Array.from({ length: 101 }, (_, j) => (45.3 * j) / 100);
    expect(evenGrid(grid)).toEqual({ start: 0, step: grid[100] / 100, count: 101 });
    const shifted = Array.from({ length: 20 }, (_, j) => 5 + 0.1 * j);
    expect(evenGrid(shifted)?.count).toBe(20);
  });

  it('are not seen in fewer than 8 values, nor where one value is off by more than rounding', () => {
    expect(evenGrid([0, 1, 2, 3, 4, 5, 6])).toBeNull();
    expect(evenGrid([0, 1, 2, 3, 4, 5, 6, 7])).toEqual({ start: 0, step: 1, count: 8 });
    const almost = Array.from({ length: 50 }, (_, j) => j);
    almost[20] += 1e-13;
    expect(evenGrid(almost)).toBeNull();
    almost[20] = 20 + 4 * EPS;
    expect(evenGrid(almost)).not.toBeNull();
  });

  it('can be a part of the values', () => {
    const values = [0, 0, 0.3, ...Array.from({ length: 12 }, (_, j) => 2 + 0.5 * j), 99];
    expect(evenGrid(values)).toBeNull();
    expect(evenGrid(values, 3, 15)).toEqual({ start: 2, step: 0.5, count: 12 });
  });
});
