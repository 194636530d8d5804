import { expect, it } from 'vitest';
import { massProduct } from '../../src/modes/mass-product.ts';
import { evaluateShape, waveNumberSquare, type ModeShape } from '../../src/modes/mode-shape.ts';
import { shapeAt } from '../../src/modes/shape-at.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';
import { integrate } from './quadrature.ts';

const EPS = Number.EPSILON;

/** ∫ρφψ + ΣMφψ by Gauss panels, and the same of the magnitudes. */
function byPanels(member: WaveMember, a: ModeShape, b: ModeShape): [number, number] {
  const out = new Float64Array(2);
  let [product, size] = [0, 0];
  for (let i = 0; i < member.segmentCount; i++) {
    const phase = Math.max(
      ...[a, b].map(
        (shape) => Math.sqrt(Math.abs(waveNumberSquare(member, i, shape.lambda))) * member.length[i],
      ),
    );
    const both = (absolute: boolean): number =>
      member.inertia[i] *
      integrate(
        (x) => {
          evaluateShape(member, a, i, x, out);
          const u = out[0];
          evaluateShape(member, b, i, x, out);
          return absolute ? Math.abs(u * out[0]) : u * out[0];
        },
        0,
        member.length[i],
        1 + Math.ceil(phase / 2),
      );
    product += both(false);
    size += both(true);
  }
  for (let j = 0; j <= member.segmentCount; j++) {
    const u = j === 0 ? a.ends[0] : a.ends[4 * j - 2];
    const w = j === 0 ? b.ends[0] : b.ends[4 * j - 2];
    product += member.mass[j] * u * w;
    size += member.mass[j] * Math.abs(u * w);
  }
  return [product, size];
}

const member = waveMember({
  segments: [
    [1, 2, 3],
    [0.7, 5, 0.4, 60],
    [0.3, 1, 0],
    [2, 3, 1, 2],
  ],
  far: 'free',
  masses: { 1: 0.5, 4: 0.8 },
  springs: { 2: 4 },
});

it('products of any two shapes agree with Gauss panels: travelling, evanescent, static and mixed', () => {
  // no natural frequencies: the product is a sum over segments whatever ω is
  const omegas = [0.01, 0.5, 1, 1.41, 3, 3.0000001, 7, 12, 12.25, 30, 100];
  const shapes = omegas.map((omega) => shapeAt(member, omega, 3));
  let worst = 0;
  for (const a of shapes) {
    for (const b of shapes) {
      const [expected, size] = byPanels(member, a, b);
      const phase = Math.sqrt(Math.max(a.lambda, b.lambda)) * 4;
      worst = Math.max(
        worst,
        Math.abs(massProduct(member, a, b) - expected) / (EPS * size * (32 + 4 * phase)),
      );
      expect(massProduct(member, a, b)).toBeCloseTo(massProduct(member, b, a), 12);
    }
  }
  expect(worst).toBeLessThan(1);
});

it('near-equal frequencies of a uniform member have the product of two sines in closed form', () => {
  // ∫₀¹ 2 sin ax sin bx = sin(a − b)/(a − b) − sin(a + b)/(a + b), here for a − b = 1e-3 … 1e-15
  const bar = waveMember(uniformTrial(1, { far: 'free' }));
  for (const gap of [1e-3, 1e-6, 1e-9, 1e-12, 1e-15]) {
    const [a, b] = [7.3, 7.3 + gap];
    const [first, second] = [shapeAt(bar, a, 0), shapeAt(bar, b, 0)];
    const size = (omega: number): number => Math.sqrt(1 - Math.sin(2 * omega) / (2 * omega));
    const expected = (1 - Math.sin(2 * a + gap) / (2 * a + gap) - (gap * gap) / 6) / (size(a) * size(b));
    expect(Math.abs(massProduct(bar, first, second) - expected)).toBeLessThan(64 * EPS);
  }
});

it('masses on fixed ends take no part', () => {
  const fixed = waveMember(uniformTrial(2));
  const loaded = { ...fixed, mass: Float64Array.of(100, 0, 100) };
  const shape = shapeAt(fixed, Math.PI, 0);
  expect(massProduct(loaded, shape, shape)).toBe(massProduct(fixed, shape, shape));
});
