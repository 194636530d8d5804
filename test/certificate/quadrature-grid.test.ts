import { describe, expect, it } from 'vitest';
import { QuadratureGrid } from '../../src/certificate/quadrature-grid.ts';
import { ModeSeries } from '../../src/modes/mode-series.ts';
import { evaluateShape } from '../../src/modes/mode-shape.ts';
import { GAUSS_20 } from '../../src/numerics/gauss-legendre.ts';
import { doubleWell, uniformTrial, waveMember, type TrialMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

const stepped: TrialMember = {
  segments: [
    [1, 2, 3],
    [0.75, 5, 0.5, 40],
    [0.5, 3, 0],
    [1.5, 3, 1],
  ],
  far: 'free',
};

it('the weights of each segment sum to its length', () => {
  const member = waveMember(stepped);
  for (const omega of [0, 3, 500]) {
    const grid = new QuadratureGrid(member, omega * omega);
    for (let i = 0; i < 4; i++) {
      const [from, to] = grid.range(i);
      const sum = grid.weights.slice(from, to).reduce((total, weight) => total + weight, 0);
      expect(Math.abs(sum / member.length[i] - 1)).toBeLessThan(EPS * (8 + (to - from)));
    }
    expect(grid.range(3)[1]).toBe(grid.size);
  }
});

describe('samples are the evaluated shapes', () => {
  it.each([
    ['stepped', stepped],
    ['double well', doubleWell(30)],
    ['uniform', uniformTrial(1)],
  ] as const)('%s', (_, trial) => {
    const member = waveMember(trial);
    const series = new ModeSeries(member);
    const modes = Array.from({ length: 40 }, () => series.next()!);
    const grid = new QuadratureGrid(member, modes[39].shape.lambda);
    const [u, p] = [new Float64Array(grid.size), new Float64Array(grid.size)];
    const out = new Float64Array(2);
    let worst = 0;
    for (const { shape, frequency } of modes) {
      grid.sample(shape, u, p);
      const high = u.reduce((top, value) => Math.max(top, Math.abs(value)), 0);
      const strong = p.reduce((top, value) => Math.max(top, Math.abs(value)), 0);
      for (let i = 0; i < member.segmentCount; i++) {
        const [from, to] = grid.range(i);
        const width = member.length[i] / ((to - from) / 20);
        for (let at = from; at < to; at++) {
          const m = at - from;
          const x = (Math.floor(m / 20) + GAUSS_20.nodes[m % 20]) * width;
          evaluateShape(member, shape, i, x, out);
          const tolerance = EPS * (16 + 8 * frequency.omega);
          worst = Math.max(worst, Math.abs(u[at] - out[0]) / (high * tolerance));
          worst = Math.max(worst, Math.abs(p[at] - out[1]) / (strong * tolerance));
        }
      }
    }
    expect(worst).toBeLessThan(1);
  });
});

it('products of shapes up to the grid’s frequency are integrated to rounding: ∫ 2 sin mπx sin nπx', () => {
  const member = waveMember(uniformTrial(3));
  const series = new ModeSeries(member);
  const modes = Array.from({ length: 200 }, () => series.next()!);
  const grid = new QuadratureGrid(member, modes[199].shape.lambda);
  const spare = new Float64Array(grid.size);
  const values = modes.map(({ shape }) => {
    const u = new Float64Array(grid.size);
    grid.sample(shape, u, spare);
    return u;
  });
  for (const [a, b] of [
    [0, 0],
    [0, 199],
    [198, 199],
    [199, 199],
    [57, 130],
  ]) {
    let sum = 0;
    for (let x = 0; x < grid.size; x++) sum += grid.weights[x] * values[a][x] * values[b][x];
    expect(Math.abs(sum - (a === b ? 1 : 0))).toBeLessThan(EPS * (64 + 8 * Math.PI * 200));
  }
});
