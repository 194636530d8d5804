import { describe, expect, it } from 'vitest';
import { readMember } from '../../src/members/read-member.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { NaturalFrequencies, type NaturalFrequency } from '../../src/spectrum/natural-frequencies.ts';
import { PhaseSweep } from '../../src/spectrum/phase-sweep.ts';
import { compareWithDecimal } from '../support/decimal.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember, type MemberFamily } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';
import { countBelow } from '../support/wittrick-williams.ts';
import { doubleWell, referenceTrial, uniformTrial, waveMember, type TrialMember } from './trial-members.ts';

const EPS = Number.EPSILON;

function lowest(member: WaveMember, count: number): NaturalFrequency[] {
  const frequencies = new NaturalFrequencies(member);
  return Array.from({ length: count }, () => frequencies.next() as NaturalFrequency);
}

function omegas(trial: TrialMember, count: number): number[] {
  return lowest(waveMember(trial), count).map(({ omega }) => omega);
}

/** Largest relative difference in units of 2⁻⁵². */
function worst(found: readonly number[], expected: readonly number[]): number {
  return Math.max(
    ...expected.map((value, i) =>
      value === 0 ? (found[i] === 0 ? 0 : Infinity) : Math.abs(found[i] / value - 1) / EPS,
    ),
  );
}

const orders = Array.from({ length: 64 }, (_, i) => i + 1);

describe('uniform members (Lord Rayleigh, Theory of Sound, 1894, §§ 122–125, 150)', () => {
  it.each([1, 2, 10, 100, 1000])('%i equal segments have the frequencies of one', (count) => {
    const speed = Math.sqrt(70e9 / 2700);
    const bar = [4.2, 70e9, 2700] as const;
    const unit = (Math.PI * speed) / 4.2;
    // the travel time is the rounded sum of the segments': half a rounding each, mostly cancelling
    const tolerance = 4 + Math.sqrt(count);
    expect(
      worst(
        omegas(uniformTrial(count, {}, bar), 64),
        orders.map((n) => n * unit),
      ),
    ).toBeLessThan(tolerance);
    expect(
      worst(
        omegas(uniformTrial(count, { far: 'free' }, bar), 64),
        orders.map((n) => (n - 0.5) * unit),
      ),
    ).toBeLessThan(tolerance);
    expect(
      worst(
        omegas(uniformTrial(count, { near: 'free', far: 'free' }, bar), 64),
        orders.map((n) => (n - 1) * unit),
      ),
    ).toBeLessThan(tolerance);
  });

  it('a bedding adds s/ρ to every ω², the mode of zero wave number included', () => {
    const [length, k, rho, s] = [3, 8, 2, 50];
    const bedded = [length, k, rho, s] as const;
    const omega = (halfWaves: number): number =>
      Math.sqrt(s / rho + (k / rho) * ((halfWaves * Math.PI) / length) ** 2);
    for (const count of [1, 4]) {
      expect(
        worst(
          omegas(uniformTrial(count, {}, bedded), 20),
          orders.slice(0, 20).map((n) => omega(n)),
        ),
      ).toBeLessThan(8);
      const free = omegas(uniformTrial(count, { near: 'free', far: 'free' }, bedded), 20);
      expect(
        worst(
          free,
          orders.slice(0, 20).map((n) => omega(n - 1)),
        ),
      ).toBeLessThan(8);
      expect(Math.abs(free[0] - 5)).toBeLessThan(8 * EPS * 5);
    }
  });
});

describe('lumps on massless members', () => {
  it('two equal masses between three equal springs have ω² = k/m and 3k/m', () => {
    const trial: TrialMember = {
      segments: [
        [0.5, 7, 0],
        [0.5, 7, 0],
        [0.5, 7, 0],
      ],
      masses: { 1: 3, 2: 3 },
    };
    expect(worst(omegas(trial, 2), [Math.sqrt(14 / 3), Math.sqrt(14)])).toBeLessThan(8);
  });

  it('two masses and three springs have the roots of their 2 × 2 determinant', () => {
    const [k0, k1, k2, m1, m2] = [4, 9, 2.5, 3, 0.7];
    const trial: TrialMember = {
      segments: [
        [2, 2 * k0, 0],
        [0.1, 0.1 * k1, 0],
        [1, k2, 0],
      ],
      masses: { 1: m1, 2: m2 },
    };
    const [a, d] = [(k0 + k1) / m1, (k1 + k2) / m2];
    const mean = 0.5 * (a + d);
    const high = mean + Math.sqrt((0.5 * (a - d)) ** 2 + (k1 * k1) / (m1 * m2));
    const low = (a * d - (k1 * k1) / (m1 * m2)) / high;
    expect(worst(omegas(trial, 2), [Math.sqrt(low), Math.sqrt(high)])).toBeLessThan(16);
  });

  it('n masses on a massless string have 2√(T/md) sin(jπ/2(n + 1)) (Lagrange; Rayleigh § 120)', () => {
    const [n, tension, gap, mass] = [40, 300, 0.25, 0.02];
    const masses = Object.fromEntries(Array.from({ length: n }, (_, i) => [i + 1, mass]));
    const segments = Array.from({ length: n + 1 }, () => [gap, tension, 0] as const);
    const expected = Array.from(
      { length: n },
      (_, i) => 2 * Math.sqrt(tension / (mass * gap)) * Math.sin(((i + 1) * Math.PI) / (2 * (n + 1))),
    );
    // a rounding a node
    expect(worst(omegas({ segments, masses }, n), expected)).toBeLessThan(n);
  });

  it('n free masses have 2√(k/m) sin(jπ/2n), j = 0 … n − 1, and then no more', () => {
    const n = 12;
    const masses = Object.fromEntries(Array.from({ length: n }, (_, i) => [i, 2]));
    const segments = Array.from({ length: n - 1 }, () => [1, 5, 0] as const);
    const frequencies = new NaturalFrequencies(waveMember({ segments, masses, near: 'free', far: 'free' }));
    expect(frequencies.total).toBe(n);
    for (let j = 0; j < n; j++) {
      const found = frequencies.next();
      const expected = 2 * Math.sqrt(2.5) * Math.sin((j * Math.PI) / (2 * n));
      expect(found?.order).toBe(j + 1);
      expect(Math.abs((found?.omega ?? NaN) - expected)).toBeLessThan(
        16 * EPS * expected + (j === 0 ? 1e-300 : 0),
      );
    }
    expect(frequencies.next()).toBeNull();
    expect(frequencies.next()).toBeNull();
    expect(frequencies.countBelow(1e9)).toBe(n);
  });

  it('one mass on a spring has ω² = K/M, however heavy or light', () => {
    for (const mass of [1e-30, 1, 1e30]) {
      const trial: TrialMember = {
        segments: [[1, 1, 0]],
        near: 'free',
        far: 'free',
        masses: { 0: mass },
        springs: { 0: 2 },
      };
      expect(worst(omegas(trial, 1), [Math.sqrt(2 / mass)])).toBeLessThan(4);
    }
  });
});

/**
 * Two wells of L = k = ρ = 1 beside a barrier of length d/30 and foundation 900, d the double given:
 * ω cot ω = −γ tanh(γb/2) and −γ coth(γb/2), γ² = 900 − ω² (mpmath at 60 digits, secant).
 */
const TWINS: readonly (readonly [number, number, string, string])[] = [
  [10, 0, '3.040073007272113856769143704041351', '3.040091657378818377910204891373799'],
  [10, 1, '6.079112991926294739976249221445397', '6.079155875756723308186036432589452'],
  [10, 2, '9.115987594177785798833369127826086', '9.116069099575648734595564079487602'],
  [20, 0, '3.040082332285057633055077558165029', '3.040082333176499229444309196185605'],
  [20, 1, '6.079134433639083648270259115558582', '6.079134436034872549248787601206778'],
  [20, 2, '9.116028345988573817687595317914233', '9.11602835192603633388565366357756'],
  [30, 0, '3.040082332730757127515476571565173', '3.040082332730799736822427673320153'],
  [30, 1, '6.079134434836911179055486687600436', '6.079134434837045024479552525852329'],
  [30, 2, '9.116028348957088821311245105748533', '9.116028348957521350470330970571573'],
  [40, 0, '3.04008233273077843115062795937346', '3.040082332730778433187276289681446'],
  [40, 1, '6.079134434836978098028751660071612', '6.079134434836978105506287571539918'],
  [40, 2, '9.116028348957305070136459284803109', '9.116028348957305101645116888812714'],
  [46, 0, '3.040082332730778432166348771917543', '3.040082332730778432171555477137363'],
  [46, 1, '6.079134434836978101757023671938188', '6.079134434836978101778015559673342'],
  [46, 2, '9.11602834895730508583892616438553', '9.116028348957305085942650009230293'],
];

describe('twins of a double well, gaps 9e-6 … 2e-21: neither missed nor doubled', () => {
  it.each(TWINS)('decay %s, pair %i lies in its enclosures', (decay, pair, symmetric, antisymmetric) => {
    const found = lowest(waveMember(doubleWell(decay)), 6).slice(2 * pair, 2 * pair + 2);
    [symmetric, antisymmetric].forEach((decimal, i) => {
      const { lower, upper, omega } = found[i];
      expect(compareWithDecimal(lower, decimal)).not.toBe(1);
      expect(compareWithDecimal(upper, decimal)).not.toBe(-1);
      // 4 roundings on either side and the noise of a smooth phase
      expect(upper - lower).toBeLessThan(16 * EPS * omega);
      expect(Math.abs(omega - Number(decimal))).toBeLessThan(8 * EPS * omega);
    });
    expect(found[1].omega).toBeGreaterThanOrEqual(found[0].omega);
  });
});

describe('every frequency is bracketed by count', () => {
  const families: MemberFamily[] = [
    'general',
    'rigid',
    'nearly-rigid',
    'massless-segments',
    'twin-wells',
    'lumps-only',
    'uniform',
  ];

  it.each(families)(
    '%s members: orders ascend, enclosures hold, counts between agree with theory',
    (family) => {
      const defects: string[] = [];
      for (let stream = 0; stream < 25; stream++) {
        const random = new RandomStream(97, stream + 1000 * families.indexOf(family));
        const plain = randomMember(random, family);
        const member = readMember(requestMember(plain));
        const frequencies = new NaturalFrequencies(member);
        const count = Math.min(frequencies.total, 40);
        const found = Array.from({ length: count }, () => frequencies.next() as NaturalFrequency);
        const other = new PhaseSweep(member);
        found.forEach(({ order, omega, lower, upper }, i) => {
          const where = `member ${stream}, mode ${order}`;
          if (order !== i + 1) defects.push(`${where}: order`);
          if (omega === 0) {
            if (i > 0 || lower !== 0 || upper !== 0) defects.push(`${where}: rigid`);
            return;
          }
          if (!(lower < upper && lower <= omega && omega <= upper)) defects.push(`${where}: not inside`);
          if (i > 0 && omega < found[i - 1].omega) defects.push(`${where}: falls`);
          // counted again by sweeps that know nothing of the search
          other.sweep(lower, order, 0);
          if (other.below > order - 1 && other.residual > 2 * other.noise) defects.push(`${where}: lower`);
          other.sweep(upper, order, member.segmentCount - 1);
          if (other.below < order && other.residual < -2 * other.noise) defects.push(`${where}: upper`);
          const next = found[i + 1];
          if (next && next.lower - upper > 1e-6 * omega) {
            const middle = 0.5 * (upper + next.lower);
            if (countBelow(plain, middle) !== order) defects.push(`${where}: count after`);
          }
        });
      }
      expect(defects).toEqual([]);
    },
  );

  it('a thousand segments of contrast 30 lose no mode', () => {
    const random = new RandomStream(5);
    const trial: TrialMember = {
      segments: Array.from({ length: 1000 }, () => [
        random.between(0.5, 1.5),
        random.decades(-0.75, 0.75),
        random.decades(-0.75, 0.75),
      ]),
      far: 'free',
      masses: { 300: 20, 1000: 5 },
      springs: { 700: 3 },
    };
    const member = waveMember(trial);
    const found = lowest(member, 60);
    const counter = new NaturalFrequencies(member);
    found.forEach(({ order, omega, lower, upper }, i) => {
      expect(order).toBe(i + 1);
      expect(counter.countBelow(lower)).toBe(order - 1);
      expect(counter.countBelow(upper)).toBe(order);
      // a few roundings a segment at most
      expect(upper - lower).toBeLessThan(4 * 1000 * EPS * omega);
    });
  });
});

describe('units do not matter', () => {
  const lumped: TrialMember = {
    segments: [
      [1, 2, 3],
      [0.5, 7, 0.2, 30],
      [2, 1, 1],
    ],
    far: 'free',
    masses: { 1: 0.4, 3: 2 },
    springs: { 2: 5 },
  };

  function scaled(stiffness: number, inertia: number): TrialMember {
    const all = (lumps: Readonly<Record<number, number>> = {}, factor: number): Record<number, number> =>
      Object.fromEntries(Object.entries(lumps).map(([node, value]) => [node, value * factor]));
    return {
      ...lumped,
      segments: lumped.segments.map(([l, k, rho, s = 0]) => [l, k * stiffness, rho * inertia, s * stiffness]),
      masses: all(lumped.masses, inertia),
      springs: all(lumped.springs, stiffness),
    };
  }

  const plain = omegas(lumped, 30);

  it.each([
    [1e40, 1],
    [1e-40, 1],
    [1, 1e40],
    [1, 1e-40],
    [1e40, 1e-40],
    [1e-40, 1e40],
    [1e40, 1e40],
  ])('stiffness times %s and inertia times %s scale ω by √(k/ρ)', (stiffness, inertia) => {
    const factor = Math.sqrt(stiffness / inertia);
    const found = omegas(scaled(stiffness, inertia), 30).map((omega) => omega / factor);
    expect(worst(found, plain)).toBeLessThan(8);
  });

  it('lengths in another unit scale ω by theirs', () => {
    const found = omegas(
      {
        ...scaled(1, 1),
        segments: lumped.segments.map(([l, k, rho, s = 0]) => [1e3 * l, 1e3 * k, 1e-3 * rho, 1e-3 * s]),
      },
      30,
    );
    expect(worst(found, plain)).toBeLessThan(8);
  });
});

describe('nearly and wholly unrestrained members', () => {
  it('a free member has ω = 0 first, its enclosure a point', () => {
    const [rigid, first] = lowest(waveMember(uniformTrial(3, { near: 'free', far: 'free' })), 2);
    expect(rigid).toEqual({ order: 1, omega: 0, lower: 0, upper: 0, joint: 0 });
    expect(Math.abs(first.omega - Math.PI)).toBeLessThan(8 * EPS);
  });

  it.each([1e-6, 1e-13, 1e-40, 1e-200])('a spring of %s leaves ω₁ = √(K/m)(1 + O(K))', (spring) => {
    const [first, second] = omegas(
      { ...uniformTrial(2, { near: 'free', far: 'free' }), springs: { 0: spring } },
      2,
    );
    // tan-root expansion: ω² = K (1 − K/3 + …) for L = k = ρ = 1
    const expected = Math.sqrt(spring * (1 - spring / 3));
    expect(Math.abs(first / expected - 1)).toBeLessThan(8 * EPS + spring * spring);
    expect(Math.abs(second / Math.PI - 1)).toBeLessThan(8 * EPS + spring);
  });
});

it('the reference member takes at most 7.5 sweeps a mode, a uniform one 4', () => {
  for (const count of [64, 256]) {
    const reference = new NaturalFrequencies(waveMember(referenceTrial()));
    for (let n = 0; n < count; n++) reference.next();
    expect(reference.sweeps / count).toBeLessThan(7.5);
    const uniform = new NaturalFrequencies(waveMember(uniformTrial(8)));
    for (let n = 0; n < count; n++) uniform.next();
    expect(uniform.sweeps / count).toBeLessThanOrEqual(4);
  }
});

it('counting below a frequency does not disturb the search', () => {
  const member = waveMember(referenceTrial());
  const plain = lowest(member, 12);
  const frequencies = new NaturalFrequencies(member);
  plain.forEach((mode, i) => {
    expect(frequencies.countBelow(mode.upper)).toBe(i + 1);
    expect(frequencies.next()?.omega).toBe(mode.omega);
  });
});
