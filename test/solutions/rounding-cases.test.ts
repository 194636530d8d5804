import { expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { ResponsesRequest, WaveSegment } from '../../src/spec/types.ts';
import { compareSeries } from '../support/compare-series.ts';

/** Members on which rounding, not the modes left out, decides: each found by a long run of the attack. */

type Unloaded = Omit<ResponsesRequest, 'series' | 'checks' | 'loads'>;

const QUANTITIES = ['displacement', 'velocity', 'force', 'acceleration'] as const;

function segment(length: number, stiffness: number, inertia: number, foundation = 0): WaveSegment {
  return { length, stiffness, inertia, foundation, drag: 0 };
}

function violations(request: Unloaded, short: number, long: number) {
  const solve = (modes: number) =>
    solveResponses({ ...request, loads: [], series: { modes }, checks: false });
  return compareSeries(solve(short), solve(long)).violations;
}

const hanging: Unloaded = {
  member: {
    kind: 'wave',
    segments: [
      segment(1.5337909167348893, 0.009134072225051802, 0),
      segment(29.938481442387815, 312.0436968155624, 0),
      segment(17.020971226900564, 0.03632428834482035, 0),
      segment(31.630956754369933, 0.004916360782087337, 0, 2.2421362373075786e-6),
      segment(15.437464672527172, 17.815436269449414, 0),
    ],
    ends: {
      near: { type: 'attached', mass: 0.18004189784453553, spring: 1.414764035799119e-5, dashpot: 0 },
      far: { type: 'fixed' },
    },
    attachments: [
      { at: 31.472272359122705, mass: 92.65099844405766, spring: 0, dashpot: 0 },
      { at: 48.49324358602327, mass: 24.51481560551229, spring: 0, dashpot: 0 },
    ],
  },
  initial: {
    displacement: [
      { type: 'half-sine', amplitude: -0.006367508663783094, halfWaves: 3 },
      { type: 'pull', at: 80.42962624928683, amplitude: -0.001002896157131132 },
    ],
    velocity: { type: 'half-sine', amplitude: 7.105125311005715e-6, halfWaves: 2 },
  },
  sample: {
    positions: [0, 28.9, 64.3, 80.5],
    times: [0, 6544, 15943],
    quantities: [...QUANTITIES],
    gaugeTime: 0,
  },
};

it('a force at the fixed end of a massless stretch does no work on the rounding of a half sine', () => {
  // all three modes of a member with three masses: the energy captured is the energy there is
  const { energy } = solveResponses({
    ...hanging,
    loads: [],
    series: { modes: 3 },
    checks: false,
  }).convergence;
  expect(Math.abs(energy.captured / energy.total - 1)).toBeLessThan(1e-14);
});

it('the force at the edge of a massless free end is known to the rounding of the stretch', () => {
  const request: Unloaded = {
    member: {
      kind: 'wave',
      segments: [
        segment(38.69273695189609, 1.5771590767884347, 19.014361052996332),
        segment(1.8869260951673141, 1.5771590767884347, 19.014361052996332),
        segment(7.0809847285505585, 1.5771590767884347, 0, 0.005367908293369827),
        segment(44.18092649617462, 1.5771590767884347, 0),
      ],
      ends: {
        near: { type: 'attached', mass: 0, spring: 0.0009107731424308021, dashpot: 0 },
        far: { type: 'free' },
      },
      attachments: [],
      damping: { type: 'rayleigh', massCoefficient: 0.01711048124701976, stiffnessCoefficient: 0 },
    },
    initial: {
      velocity: {
        type: 'polynomial',
        coefficients: [
          0.00011968365430207488, -0.00008948183512973008, 0.00001807232990176958, -5.035408065510964e-7,
          3.789958190703461e-9,
        ],
        from: 2.792416957744242,
        to: 63.6385014342121,
      },
    },
    sample: {
      positions: [0, 8.54908652501803, 40.5796630470634, 47.66064768377239, 82.17776062953531],
      times: [0, 21.64562199114964, 96.05074668768324, 194.71701522152415],
      quantities: [...QUANTITIES],
      gaugeTime: 0,
    },
  };
  expect(violations(request, 98, 784)).toEqual([]);
});

it('a free member that carries 300,000 times its own mass is answered with 400 modes', () => {
  const request: Unloaded = {
    member: {
      kind: 'wave',
      segments: [
        segment(114.62550449338106, 5417641029.644864, 2.7747464539211735),
        segment(102.38097427533835, 10464489561.175734, 0.3021595013421798),
        segment(69.11327245477918, 169768227649.4708, 5.17182576290358e-5),
        segment(76.1692738627429, 33263621.571260314, 0.023844151310984225),
        segment(76.05009490913645, 19122743.561248206, 0.0012626348736346493),
      ],
      ends: { near: { type: 'free' }, far: { type: 'free' } },
      attachments: [{ at: 362.2890250862415, mass: 331134.3910117209, spring: 0, dashpot: 0 }],
    },
    initial: {
      velocity: {
        type: 'uniform',
        value: 0.05312190574087467,
        from: 206.23994324608023,
        to: 375.02206589367137,
      },
    },
    sample: {
      positions: [0, 122.29427349688393, 217.0064787687194, 362.2890250862415, 437.90078087537257],
      times: [0, 0.0063490213908570965, 0.02555622609603139],
      quantities: [...QUANTITIES],
      gaugeTime: 0,
    },
  };
  expect(violations(request, 7, 400)).toEqual([]);
});

it('a stiff massless stretch leaves digits of the acceleration to the difference of its ends', () => {
  // the only mode reaches its largest force at t = 0: the limit of the peak is attained
  const request: Unloaded = {
    member: {
      kind: 'wave',
      segments: [
        segment(0.21840306095892983, 0.003159653755264746, 0, 0.00492325495765667),
        segment(0.02817987689922289, 1456.5284549971957, 0),
        segment(0.2789123849329555, 0.6835120068613145, 0),
      ],
      ends: { near: { type: 'free' }, far: { type: 'fixed' } },
      attachments: [{ at: 0.21840306095892983, mass: 16.142417981101485, spring: 0, dashpot: 0 }],
      damping: { type: 'ratio', value: 0.999 },
    },
    initial: {
      displacement: {
        type: 'polynomial',
        coefficients: [-0.0002434473437869598, 0.001959495025193695, -0.003216592373121834],
        from: 0.17385814519762624,
        to: 0.435325362656036,
      },
    },
    sample: {
      positions: [0, 0.2465829373326574, 0.40244351228237596, 0.5254953227911082],
      times: [0, 12.167101929319434, 17.092675796207665],
      quantities: [...QUANTITIES],
      gaugeTime: 0,
    },
  };
  expect(violations(request, 9, 400)).toEqual([]);
});

it('the compliance of a balanced load on a nearly free member rounds as the whole load would', () => {
  // four half waves push and pull: their resultant is rounding, but it meets a spring of 5e-8 N/m
  const request: Omit<ResponsesRequest, 'series'> = {
    member: {
      kind: 'wave',
      segments: [segment(4.153760929432461, 2212.6322039721645, 0.04570381154378169)],
      ends: {
        near: { type: 'attached', mass: 0, spring: 5.326816447942473e-8, dashpot: 0 },
        far: { type: 'attached', mass: 1.2625274790985883, spring: 0, dashpot: 0 },
      },
      attachments: [],
      damping: { type: 'rayleigh', massCoefficient: 0, stiffnessCoefficient: 0.00003775833983101349 },
    },
    initial: {},
    loads: [
      {
        type: 'distributed-force',
        profile: { type: 'half-sine', amplitude: 5.233236757150887, halfWaves: 4 },
        history: { type: 'rectangular-pulse', amplitude: 1, start: 0, duration: 0.0029670648368285836 },
      },
    ],
    sample: {
      positions: [0, 0.06811977434495337, 0.5278982621450902, 1.4441021484225776, 4.153760929432461],
      times: [0, 0.0004909761129396937, 0.005689585223524464, 0.016898609295663652],
      quantities: ['displacement', 'velocity', 'force'],
      gaugeTime: 0.002263329622547819,
    },
    checks: false,
  };
  const solve = (modes: number) => solveResponses({ ...request, series: { modes } });
  expect(compareSeries(solve(35), solve(175)).violations).toEqual([]);
});

it('a rigid-body motion alone is smooth with many modes too, stiffness-proportional damping or not', () => {
  const request: Unloaded = {
    member: {
      kind: 'wave',
      segments: [
        segment(36.34608599844699, 0.5193606315318128, 0.24652984047848636),
        segment(6.049254357940623, 6.6004711937586436, 0.7273425677707089),
        segment(66.79109, 47.05262363413672, 2.1725538657169525),
      ],
      ends: {
        near: { type: 'attached', mass: 7725.500340837425, spring: 0, dashpot: 0 },
        far: { type: 'attached', mass: 1304.2368132915205, spring: 0, dashpot: 0 },
      },
      attachments: [{ at: 42.395340356387614, mass: 16889.41100972642, spring: 0, dashpot: 0 }],
      damping: { type: 'rayleigh', massCoefficient: 0.0005, stiffnessCoefficient: 0.17 },
    },
    initial: { velocity: { type: 'uniform', value: 0.001352071180414089, from: 0 } },
    sample: { positions: [0, 24.7, 65.8], times: [0, 3, 300], quantities: [...QUANTITIES], gaugeTime: 0 },
  };
  expect(violations(request, 1, 400)).toEqual([]);
  const { fields } = solveResponses({ ...request, loads: [], series: { modes: 400 }, checks: false });
  expect(fields.acceleration!.boundKind).toBe('pointwise');
});
