import {
  bar,
  type BadRequest,
  cable,
  type Changes,
  fixed,
  free,
  shaft,
  steelShaft,
  table,
  transfer,
} from './request-cases.ts';

const { rows, bad } = table();

/** A request of responses with these loads and no initial motion. */
const loaded = (...loads: unknown[]): Changes => ({
  member: cable(),
  loads,
  sample: { times: { end: 2, count: 11 } },
});
const step = { type: 'step', amplitude: 1 };
const force = (changes: Changes = {}): Changes => ({
  type: 'point-force',
  at: 15,
  history: step,
  ...changes,
});
const under = (history: unknown): Changes => loaded(force({ history }));
const profiled = (profile: unknown, history: unknown = step): Changes =>
  loaded({ type: 'distributed-force', profile, history });
const even = { type: 'uniform', value: 3 };
const ramp = { type: 'ramp', amplitude: 0.01, duration: 0.5 };
const motion = (changes: Changes = {}): Changes => ({
  type: 'end-motion',
  end: 'near',
  quantity: 'displacement',
  history: ramp,
  ...changes,
});
const crossing = (changes: Changes = {}): Changes => ({
  type: 'moving-force',
  force: 700,
  speed: 20,
  ...changes,
});
const historyAt = '/loads/0/history';

// Loads as a whole
bad('a load instead of a list', 'responses', { ...loaded(), loads: force() }, 400, [
  'wrong-type',
  '/loads',
  /loads must be a list, but is an object/,
]);
bad('a load that is nothing', 'responses', loaded(null), 400, [
  'wrong-type',
  '/loads/0',
  /item 0 of loads must be an object, but is null/,
]);
bad('a load without type', 'responses', loaded({ at: 3, history: step }), 400, [
  'missing-key',
  '/loads/0/type',
  /point-force, distributed-force, body-force, end-motion, moving-force/,
]);
bad('an unknown load', 'responses', loaded(force(), { type: 'wind', speed: 30 }), 400, [
  'not-one-of',
  '/loads/1/type',
  /"wind".*point-force, distributed-force, body-force, end-motion, moving-force/,
]);
bad('more loads than are taken', 'responses', loaded(...Array.from({ length: 1001 }, () => force())), 400, [
  'too-many-items',
  '/loads',
  /1001 items; at most 1000/,
]);
bad('a force without history', 'responses', loaded({ type: 'point-force', at: 3 }), 400, [
  'missing-key',
  '/loads/0/history',
  /history is missing. The force, N/,
]);
bad('a place for a body force', 'responses', loaded({ type: 'body-force', at: 3, history: step }), 400, [
  'unknown-key',
  '/loads/0/at',
  /"at" is not a key here.*type, history/,
]);
bad('a history for a moving force', 'responses', loaded(crossing({ history: step })), 400, [
  'unknown-key',
  '/loads/0/history',
  /type, force, speed, start/,
]);
bad('a moving force without speed', 'responses', loaded({ type: 'moving-force', force: 1 }), 400, [
  'missing-key',
  '/loads/0/speed',
  /speed is missing.*positive from the near to the far end/,
]);
bad('an end that is neither near nor far', 'responses', loaded(motion({ end: 'left' })), 400, [
  'not-one-of',
  '/loads/0/end',
  /"left".*near, far, both/,
]);
bad(
  'a motion given by its velocity, which leaves open what its unit is',
  'responses',
  loaded(motion({ quantity: 'velocity', history: { ...ramp, amplitude: '3 mm/s' } })),
  400,
  ['not-one-of', '/loads/0/quantity', /"velocity".*displacement, acceleration/],
);

// Histories
bad('a history without type', 'responses', under({ amplitude: 1 }), 400, [
  'missing-key',
  `${historyAt}/type`,
  /harmonic, step, ramp, half-sine-pulse, rectangular-pulse, samples/,
]);
bad('an unknown history', 'responses', under({ type: 'sine', amplitude: 1 }), 400, [
  'not-one-of',
  `${historyAt}/type`,
  /"sine".*harmonic, step, ramp/,
]);
bad('a history that is a list of numbers', 'responses', under([0, 1, 0]), 400, [
  'wrong-type',
  historyAt,
  /history must be an object, but is a list of 3/,
]);
bad('a harmonic without frequency', 'responses', under({ type: 'harmonic', amplitude: 1 }), 400, [
  'missing-key',
  `${historyAt}/frequency`,
  /frequency is missing. Frequency, Hz/,
]);
bad('a harmonic of no frequency', 'responses', under({ type: 'harmonic', amplitude: 1, frequency: 0 }), 400, [
  'out-of-range',
  `${historyAt}/frequency`,
  /frequency must be above 0 Hz, but is 0/,
]);
bad(
  'an angular frequency for a frequency',
  'responses',
  under({ type: 'harmonic', amplitude: 1, frequency: '150 rad/s' }),
  400,
  ['unit-dimension', `${historyAt}/frequency`, /"150 rad\/s".*but a frequency is wanted here: in Hz/],
);
bad(
  'a phase that is a time',
  'responses',
  under({ type: 'harmonic', amplitude: 1, frequency: 2, phase: '0.25 s' }),
  400,
  ['unit-dimension', `${historyAt}/phase`, /a time, but an angle is wanted here: in rad, mrad, deg/],
);
bad('a ramp without duration', 'responses', under({ type: 'ramp', amplitude: 1 }), 400, [
  'missing-key',
  `${historyAt}/duration`,
  /duration is missing. Duration of the rise, s/,
]);
bad('a ramp of no duration', 'responses', under({ ...ramp, duration: 0 }), 400, [
  'out-of-range',
  `${historyAt}/duration`,
  /duration must be above 0 s, but is 0/,
]);
bad(
  'a pulse of negative duration',
  'responses',
  under({ type: 'half-sine-pulse', amplitude: 1, duration: '-5 ms' }),
  400,
  ['out-of-range', `${historyAt}/duration`, /above 0 s, but is "-5 ms"/],
);
bad(
  'a pulse with an end',
  'responses',
  under({ type: 'rectangular-pulse', amplitude: 1, duration: 1, end: 2 }),
  400,
  ['unknown-key', `${historyAt}/end`, /Did you mean start\?|type, amplitude, start, duration/],
);
bad('a history before time 0', 'responses', under({ ...step, start: -1 }), 400, [
  'out-of-range',
  `${historyAt}/start`,
  /start must be 0 s or more, but is -1/,
]);
bad('a moving force before time 0', 'responses', loaded(crossing({ start: '-2 s' })), 400, [
  'out-of-range',
  '/loads/0/start',
  /start must be 0 s or more, but is "-2 s"/,
]);
bad('samples without interval', 'responses', under({ type: 'samples', values: [0, 1] }), 400, [
  'missing-key',
  `${historyAt}/interval`,
  /interval is missing. Time between two samples/,
]);
bad('samples at one time', 'responses', under({ type: 'samples', interval: 0, values: [0, 1] }), 400, [
  'out-of-range',
  `${historyAt}/interval`,
  /interval must be above 0 s, but is 0/,
]);
bad('one sample', 'responses', under({ type: 'samples', interval: 1, values: [1] }), 400, [
  'too-few-items',
  `${historyAt}/values`,
  /1 items, but needs at least 2/,
]);
bad(
  'more samples than are taken',
  'responses',
  under({ type: 'samples', interval: 1, values: Array.from({ length: 200_001 }, () => 0) }),
  400,
  ['too-many-items', `${historyAt}/values`, /200001 items; at most 200000/],
);
bad('a gap in a record', 'responses', under({ type: 'samples', interval: 1, values: [0, null, 1] }), 400, [
  'wrong-type',
  `${historyAt}/values/1`,
  /item 1 of values must be a number in N, or a text with a unit such as "12.5 N", but is null/,
]);

// Units of amplitudes by load and kind of member
bad('a torque on a cable', 'responses', under({ ...step, amplitude: '3 kN.m' }), 400, [
  'unit-dimension',
  `${historyAt}/amplitude`,
  /a torque, but a force is wanted here: in N, kN/,
]);
bad(
  'a force on a shaft',
  'responses',
  { ...loaded(force({ at: 1, history: { ...step, amplitude: '3 kN' } })), member: shaft(steelShaft) },
  400,
  ['unit-dimension', `${historyAt}/amplitude`, /a force, but a torque is wanted here: in N.m/],
);
bad(
  'a force for the acceleration of a body force',
  'responses',
  loaded({ type: 'body-force', history: { ...step, amplitude: '3 kN' } }),
  400,
  [
    'unit-dimension',
    `${historyAt}/amplitude`,
    /a force, but an acceleration is wanted here: in m\/s2.*\[g\]/,
  ],
);
bad(
  'an acceleration for an end displacement',
  'responses',
  loaded(motion({ history: { ...ramp, amplitude: '0.2 [g]' } })),
  400,
  ['unit-dimension', `${historyAt}/amplitude`, /an acceleration, but a length is wanted/],
);
bad(
  'displacements in an acceleration record',
  'responses',
  loaded(
    motion({
      quantity: 'acceleration',
      history: { type: 'samples', interval: '10 ms', values: [0, '2 mm', '0.1 [g]', '3 cm'] },
    }),
  ),
  400,
  ['unit-dimension', `${historyAt}/values/1`, /"2 mm" is a length, but an acceleration is wanted/],
  ['unit-dimension', `${historyAt}/values/3`, /"3 cm" is a length/],
);
bad(
  'a length for the turn of a shaft end',
  'responses',
  { ...loaded(motion({ history: { ...ramp, amplitude: '2 mm' } })), member: shaft(steelShaft) },
  400,
  ['unit-dimension', `${historyAt}/amplitude`, /a length, but an angle is wanted here: in rad/],
);
bad('a unit on the factor of a profile', 'responses', profiled(even, { ...step, amplitude: '3 kN' }), 400, [
  'number-wanted',
  `${historyAt}/amplitude`,
  /"3 kN" is a text, but a plain number is wanted.*profile/,
]);
bad('a factor that is true', 'responses', profiled(even, { ...step, amplitude: true }), 400, [
  'wrong-type',
  `${historyAt}/amplitude`,
  /amplitude must be a number, but is true/,
]);
bad('a force for a force per length', 'responses', profiled({ type: 'uniform', value: '3 kN' }), 400, [
  'unit-dimension',
  '/loads/0/profile/value',
  /a force, but a force per length is wanted here: in N\/m, kN\/m/,
]);
bad(
  'coefficients of a profile that do not go with x',
  'responses',
  profiled({ type: 'polynomial', coefficients: ['1 kN/m', '2 kN/m'] }),
  400,
  [
    'unit-dimension',
    '/loads/0/profile/coefficients/1',
    /a force per length per m is wanted here: in N\/m\/m/,
  ],
);
bad('two profiles', 'responses', profiled([even, even]), 400, [
  'wrong-type',
  '/loads/0/profile',
  /profile must be an object, but is a list of 2/,
]);
bad('a frequency for a speed', 'responses', loaded(crossing({ speed: '3 Hz' })), 400, [
  'unit-dimension',
  '/loads/0/speed',
  /a frequency, but a speed is wanted/,
]);

// Loads that do not fit to the member, to the times or to each other
bad('a force beyond the member', 'responses', loaded(force({ at: 46 })), 422, [
  'position-outside',
  '/loads/0/at',
  /46 m lies beyond the far end.*45 m/,
]);
bad('a force on a fixed end', 'responses', loaded(force(), force({ at: 45 })), 422, [
  'force-at-fixed-end',
  '/loads/1/at',
  /45 m acts on the fixed far end.*"type": "end-motion"/,
]);
bad('a profile beyond the member', 'responses', profiled({ ...even, from: 2, to: '46 m' }), 422, [
  'position-outside',
  '/loads/0/profile/to',
  /46 m/,
]);
bad('a profile on nothing', 'responses', profiled({ ...even, from: 20, to: 20 }), 422, [
  'stretch-empty',
  '/loads/0/profile/to',
  /from 20 m to 20 m is empty/,
]);
bad('a force as a profile', 'responses', profiled({ type: 'pull', at: 15, force: 100 }), 422, [
  'force-in-profile',
  '/loads/0/profile/force',
  /force per length at 15 m.*"point-force"/,
]);
bad(
  'a profile of unequal lists',
  'responses',
  profiled({ type: 'polyline', positions: [0, 45], values: [1, 2, 3] }),
  422,
  ['lengths-differ', '/loads/0/profile/values', /2 positions and 3 values/],
);
bad('a moving force that stands', 'responses', loaded(crossing({ speed: 0 })), 422, [
  'moving-force-at-rest',
  '/loads/0/speed',
  /speed of the moving force is 0.*"point-force"/,
]);
bad(
  'a moving force that comes after the last sample',
  'responses',
  loaded(crossing({ start: 2.5, speed: -20 })),
  422,
  ['moving-force-misses', '/loads/0/start', /enters the member at 2.5 s.*last sampled time \(2 s\)/],
);
bad(
  'a motion of a free end',
  'responses',
  { ...loaded(motion({ end: 'far' })), member: cable({ ends: { near: fixed, far: free } }) },
  422,
  ['end-motion-not-fixed', '/loads/0/end', /far end as a support.*of type "free".*"fixed"/],
);
bad(
  'a motion of both ends, one of which has a spring',
  'responses',
  {
    ...loaded(motion({ end: 'both', quantity: 'acceleration' })),
    member: cable({ ends: { near: { type: 'attached', spring: 1e6 }, far: fixed } }),
  },
  422,
  ['end-motion-not-fixed', '/loads/0/end', /near end as a support.*"attached"/],
);
bad(
  'an end moved by two loads',
  'responses',
  loaded(force(), motion({ end: 'far' }), motion({ end: 'both', quantity: 'acceleration' })),
  422,
  ['end-motion-twice', '/loads/2/end', /far end is moved by load 1 already/],
);
bad('a step of a support', 'responses', loaded(motion({ history: { ...step, start: '20 ms' } })), 422, [
  'end-displacement-jumps',
  historyAt,
  /near end jumps by 1 m at 0.02 s.*a ramp, or samples/,
]);
bad(
  'a rectangular pulse of a support',
  'responses',
  loaded(motion({ end: 'far', history: { type: 'rectangular-pulse', amplitude: '-2 mm', duration: 1 } })),
  422,
  ['end-displacement-jumps', historyAt, /far end jumps by -0.002 m at 0 s/],
);
bad(
  'a support that begins at the crest of a harmonic',
  'responses',
  loaded(motion({ end: 'both', history: { type: 'harmonic', amplitude: 0.01, frequency: 2 } })),
  422,
  ['end-displacement-jumps', historyAt, /near end jumps by 0.01 m at 0 s.*phase "-90 deg"/],
);
bad(
  'a shaft end that begins out of phase',
  'responses',
  {
    ...loaded(
      motion({ history: { type: 'harmonic', amplitude: 2, frequency: 2, phase: '60 deg', start: 1 } }),
    ),
    member: shaft(steelShaft),
  },
  422,
  ['end-displacement-jumps', historyAt, /jumps by 1 rad at 1 s/],
);
bad(
  'a late record of a support that does not begin at 0',
  'responses',
  loaded(motion({ history: { type: 'samples', interval: 1, values: [0.1, 0], start: 1 } })),
  422,
  ['end-displacement-jumps', historyAt, /jumps by 0.1 m at 1 s.*first sample be 0/],
);
bad(
  'a record that does not begin at rest',
  'responses',
  loaded(motion({ history: { type: 'samples', interval: '10 ms', values: ['1 mm', 0] } })),
  422,
  [
    'end-displacement-disagrees',
    historyAt,
    /near end begins at 0.001 m, but the initial displacement of the member there is 0 m/,
  ],
);
const slope = { type: 'polynomial', coefficients: [0, 0.002] };
bad(
  'a ramp of a support that is displaced already',
  'responses',
  { ...loaded(motion({ end: 'far' })), initial: { displacement: slope } },
  422,
  ['end-displacement-disagrees', historyAt, /far end begins at 0 m.*there is 0.09 m/],
);
bad(
  'an acceleration of a support that is displaced already',
  'responses',
  { ...loaded(motion({ end: 'far', quantity: 'acceleration' })), initial: { displacement: [slope] } },
  422,
  ['end-displacement-disagrees', historyAt, /far end begins at 0 m.*there is 0.09 m/],
);
bad(
  'a harmonic that begins elsewhere than the member',
  'responses',
  {
    ...loaded(motion({ end: 'far', history: { type: 'harmonic', amplitude: 0.08, frequency: 1 } })),
    initial: { displacement: slope },
  },
  422,
  ['end-displacement-jumps', historyAt, /far end jumps by -0.01 m at 0 s/],
);
bad(
  'a loss factor under a load',
  'responses',
  { ...loaded(force()), member: cable({ damping: { type: 'loss-factor', value: 0.04 } }) },
  422,
  ['loss-factor-in-time', '/member/damping', /"value": 0.02.*transfer functions/],
);
bad(
  'several loads with faults of their own',
  'responses',
  loaded(force({ at: 50 }), { type: 'gust' }, crossing({ speed: 0 }), motion({ history: step }), force()),
  400,
  ['not-one-of', '/loads/1/type', /"gust"/],
  ['position-outside', '/loads/0/at', /50 m/],
  ['moving-force-at-rest', '/loads/2/speed', /speed/],
  ['end-displacement-jumps', '/loads/3/history', /jumps by 1 m/],
);
bad('a load in a request of modes', 'modes', { member: cable(), series: { modes: 1 }, loads: [] }, 400, [
  'unknown-key',
  '/loads',
  /member, series, shapes, energyShares, participation/,
]);
bad(
  'loads that are listed where the member is missing',
  'responses',
  { loads: [motion({ history: step })], sample: { times: [1] } },
  400,
  ['missing-key', '/member', /member is missing/],
  ['end-displacement-jumps', historyAt, /jumps by 1 m/],
);

// Transfer functions
bad(
  'nothing but a member',
  'transfer-functions',
  { member: cable() },
  400,
  ['missing-key', '/input', /input is missing/],
  ['missing-key', '/outputs', /outputs is missing/],
  ['missing-key', '/frequencies', /frequencies is missing/],
);
bad('an unknown input', 'transfer-functions', transfer({ input: { type: 'force', at: 3 } }), 400, [
  'not-one-of',
  '/input/type',
  /"force".*point-force, end-motion, outcrop-motion/,
]);
bad(
  'an amplitude of the input',
  'transfer-functions',
  transfer({ input: { type: 'point-force', at: 3, amplitude: 5 } }),
  400,
  ['unknown-key', '/input/amplitude', /"amplitude" is not a key here/],
);
const outcrop = (changes: Changes = {}): Changes => ({
  type: 'outcrop-motion',
  end: 'near',
  impedance: 2e6,
  quantity: 'displacement',
  ...changes,
});
bad(
  'a half-space under both ends',
  'transfer-functions',
  transfer({ input: outcrop({ end: 'both' }) }),
  400,
  ['not-one-of', '/input/end', /"both".*near, far/],
);
bad(
  'a half-space of no impedance',
  'transfer-functions',
  transfer({ input: outcrop({ impedance: 0 }) }),
  400,
  ['out-of-range', '/input/impedance', /impedance must be above 0 N.s\/m, but is 0/],
);
bad(
  'a stiffness for an impedance',
  'transfer-functions',
  transfer({ input: outcrop({ impedance: '3 MN/m' }) }),
  400,
  ['unit-dimension', '/input/impedance', /a stiffness, but an impedance is wanted here: in N.s\/m/],
);
bad('no outputs', 'transfer-functions', transfer({ outputs: [] }), 400, [
  'too-few-items',
  '/outputs',
  /0 items, but needs at least 1/,
]);
bad(
  'a relative displacement over frequency',
  'transfer-functions',
  transfer({ outputs: [{ at: 3, quantity: 'relativeDisplacement' }] }),
  400,
  ['not-one-of', '/outputs/0/quantity', /displacement, velocity, acceleration, force, stress/],
);
const span = { from: 1, to: 10, count: 10 };
bad('one frequency of a span', 'transfer-functions', transfer({ frequencies: { ...span, count: 1 } }), 400, [
  'out-of-range',
  '/frequencies/count',
  /count must be 2 or more, but is 1/,
]);
bad(
  'more frequencies than are taken',
  'transfer-functions',
  transfer({ frequencies: { ...span, count: 100_001 } }),
  400,
  ['out-of-range', '/frequencies/count', /at most 100000, but is 100001/],
);
bad('an unknown spacing', 'transfer-functions', transfer({ frequencies: { ...span, spacing: 'log' } }), 400, [
  'not-one-of',
  '/frequencies/spacing',
  /"log".*linear, logarithmic/,
]);
bad('a negative frequency', 'transfer-functions', transfer({ frequencies: [-1, 1] }), 400, [
  'out-of-range',
  '/frequencies/0',
  /item 0 of frequencies must be 0 Hz or more, but is -1/,
]);
bad(
  'a number of modes up to a frequency',
  'transfer-functions',
  transfer({ series: { upTo: 5 } }),
  400,
  ['missing-key', '/series/modes', /modes is missing/],
  ['unknown-key', '/series/upTo', /"upTo" is not a key here/],
);
bad('an initial motion over frequency', 'transfer-functions', transfer({ initial: {} }), 400, [
  'unknown-key',
  '/initial',
  /member, input, outputs, frequencies, refine, series/,
]);

bad(
  'an input force on a fixed end',
  'transfer-functions',
  transfer({ input: { type: 'point-force', at: 0 } }),
  422,
  ['force-at-fixed-end', '/input/at', /0 m acts on the fixed near end/],
);
bad(
  'an input force beyond the member',
  'transfer-functions',
  transfer({ input: { type: 'point-force', at: '50 m' } }),
  422,
  ['position-outside', '/input/at', /50 m/],
);
bad(
  'a motion of a free end over frequency',
  'transfer-functions',
  transfer({
    member: bar({ axialStiffness: 1e9, massPerLength: 80 }),
    input: { type: 'end-motion', end: 'far', quantity: 'displacement' },
    outputs: [{ at: 3, quantity: 'velocity' }],
  }),
  422,
  ['end-motion-not-fixed', '/input/end', /far end as a support.*"free"/],
);
bad(
  'a half-space at a free end',
  'transfer-functions',
  transfer({
    member: bar({ axialStiffness: 1e9, massPerLength: 80 }),
    input: outcrop({ end: 'far' }),
    outputs: [{ at: 3, quantity: 'velocity' }],
  }),
  422,
  ['outcrop-end-not-fixed', '/input/end', /half-space stands under the far end.*"free".*"fixed"/],
);
bad(
  'an output beyond the member',
  'transfer-functions',
  transfer({
    outputs: [
      { at: 3, quantity: 'force' },
      { at: 45.5, quantity: 'force' },
    ],
  }),
  422,
  ['position-outside', '/outputs/1/at', /45.5 m/],
);
bad(
  'a stress without section',
  'transfer-functions',
  transfer({
    member: {
      kind: 'bar',
      segments: [
        { length: 2, axialStiffness: 1e9, massPerLength: 80, area: 0.01 },
        { length: 2, axialStiffness: 1e9, massPerLength: 80 },
      ],
      ends: { near: fixed, far: free },
    },
    input: { type: 'point-force', at: 4 },
    outputs: [0, 2, 2.001, 4].map((at) => ({ at, quantity: 'stress' })),
  }),
  422,
  [
    'stress-without-section',
    '/outputs/2/quantity',
    /2.001 m needs the section of segment 1; give its "area"/,
  ],
  ['stress-without-section', '/outputs/3/quantity', /4 m needs the section of segment 1/],
);
bad(
  'a stress in a cable',
  'transfer-functions',
  transfer({ outputs: [{ at: 0, quantity: 'stress' }] }),
  422,
  ['stress-without-section', '/outputs/0/quantity', /segment 0; a cable has no stress here/],
);
bad('frequencies that turn back', 'transfer-functions', transfer({ frequencies: [1, 3, '3 Hz'] }), 422, [
  'frequencies-not-ascending',
  '/frequencies/2',
  /3 Hz does not lie above the one before it \(3 Hz\)/,
]);
bad(
  'a frequency span that ends before its start',
  'transfer-functions',
  transfer({ frequencies: { ...span, to: '0.5 Hz' } }),
  422,
  ['frequency-span-empty', '/frequencies/to', /end at 0.5 Hz, not above their start at 1 Hz/],
);
bad(
  'logarithmic spacing from zero',
  'transfer-functions',
  transfer({ frequencies: { ...span, from: 0, spacing: 'logarithmic' } }),
  422,
  ['logarithm-from-zero', '/frequencies/from', /"from" be above 0, or choose linear/],
);
const shaken = { type: 'end-motion', end: 'both', quantity: 'acceleration' };
bad(
  'an acceleration input at 0 Hz',
  'transfer-functions',
  transfer({ input: shaken, frequencies: [0, 1] }),
  422,
  ['acceleration-at-zero-frequency', '/frequencies/0', /At 0 Hz.*take the displacement as input/],
);
bad(
  'an outcrop acceleration from 0 Hz on',
  'transfer-functions',
  transfer({ input: outcrop({ quantity: 'acceleration' }), frequencies: { ...span, from: 0 } }),
  422,
  ['acceleration-at-zero-frequency', '/frequencies/from', /At 0 Hz/],
);
bad(
  'more values of transfer functions than one answer holds',
  'transfer-functions',
  transfer({
    outputs: Array.from({ length: 11 }, () => ({ at: 3, quantity: 'force' })),
    frequencies: { ...span, count: 100_000 },
  }),
  422,
  ['too-many-values', '/frequencies', /1100000 numbers.*11 outputs × 100000 frequencies/],
);
bad(
  'a dashpot over frequency',
  'transfer-functions',
  transfer({
    member: cable({
      attachments: [{ at: 2, dashpot: 5 }],
      damping: { type: 'loss-factor', value: 0.01 },
    }),
  }),
  422,
  ['dashpot-unsupported', '/member/attachments/0/dashpot', /dashpot 5/],
);

export const badLoadRequests: readonly BadRequest[] = rows;
