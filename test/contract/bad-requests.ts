import { badLoadRequests } from './bad-load-requests.ts';
import {
  bar,
  cable,
  type BadRequest,
  type Changes,
  column,
  fixed,
  free,
  modes,
  responses,
  shaft,
  steelBar,
  steelShaft,
  table,
} from './request-cases.ts';

const moved = (displacement: unknown): Changes => responses({ initial: { displacement } });
const sampled = (changes: Changes): Changes =>
  responses({ sample: { times: { end: 2, count: 11 }, ...changes } });

const { rows, bad } = table();

// The request as a whole
bad('a list instead of a request', 'modes', [], 400, [
  'wrong-type',
  '',
  /must be an object, but is an empty list/,
]);
bad('null instead of a request', 'responses', null, 400, [
  'wrong-type',
  '',
  /must be an object, but is null/,
]);
bad(
  'nothing at all',
  'modes',
  {},
  400,
  ['missing-key', '/member', /member is missing/],
  ['missing-key', '/series', /series is missing.*Which modes/],
);
bad('jobs, which are not taken', 'responses', responses({ jobs: [] }), 400, [
  'unknown-key',
  '/jobs',
  /"jobs" is not a key here.*member, initial, loads, series, sample, checks/,
]);
bad('a slip in a key', 'modes', modes({ membr: 1 }), 400, ['unknown-key', '/membr', /Did you mean member\?/]);
bad('a key that needs escaping', 'modes', modes({ 'a/b~c': 1 }), 400, [
  'unknown-key',
  '/a~1b~0c',
  /"a\/b~c" is not a key/,
]);
bad('a flag in words', 'responses', responses({ checks: 'yes' }), 400, [
  'wrong-type',
  '/checks',
  /checks must be true or false, but is "yes"/,
]);
bad('a flag as a number', 'modes', modes({ energyShares: 1 }), 400, [
  'wrong-type',
  '/energyShares',
  /must be true or false, but is 1/,
]);
bad('nothing that moves', 'responses', { member: cable(), sample: { times: [0] } }, 422, [
  'nothing-moves',
  '',
  /neither an initial motion nor a load.*Give "initial", "loads" or both/,
]);
bad('an empty initial motion and no load', 'responses', responses({ initial: {}, loads: [] }), 422, [
  'nothing-moves',
  '',
  /stays at rest/,
]);

// The member
bad('no kind', 'modes', modes({ member: { segments: [] } }), 400, [
  'missing-key',
  '/member/kind',
  /cable, bar, shaft, shear-column, wave/,
]);
bad('an unknown kind', 'modes', modes({ member: { ...cable(), kind: 'rope' } }), 400, [
  'not-one-of',
  '/member/kind',
  /"rope".*cable, bar, shaft, shear-column, wave/,
]);
bad('a kind that is no text', 'modes', modes({ member: { ...cable(), kind: 3 } }), 400, [
  'not-one-of',
  '/member/kind',
  /kind is 3/,
]);
const { tension: _tension, ...slack } = cable();
bad('a cable without tension', 'modes', modes({ member: slack }), 400, [
  'missing-key',
  '/member/tension',
  /tension is missing.*Tension T, N/,
]);
bad(
  'a tension in each segment',
  'modes',
  modes({ member: cable({ segments: [{ length: 1, massPerLength: 1, tension: 5 }] }) }),
  400,
  ['unknown-key', '/member/segments/0/tension', /"tension" is not a key here/],
);
bad('a slack cable', 'modes', modes({ member: cable({ tension: 0 }) }), 400, [
  'out-of-range',
  '/member/tension',
  /tension must be above 0 N, but is 0/,
]);
bad('no segments', 'modes', modes({ member: cable({ segments: [] }) }), 400, [
  'too-few-items',
  '/member/segments',
  /0 items, but needs at least 1/,
]);
bad(
  'more segments than are taken',
  'modes',
  modes({
    member: cable({ segments: Array.from({ length: 1001 }, () => ({ length: 1, massPerLength: 1 })) }),
  }),
  400,
  ['too-many-items', '/member/segments', /1001 items; at most 1000/],
);
bad('a segment that is a number', 'modes', modes({ member: cable({ segments: [45] }) }), 400, [
  'wrong-type',
  '/member/segments/0',
  /item 0 of segments must be an object, but is 45/,
]);
bad(
  'a segment of no length',
  'modes',
  modes({ member: cable({ segments: [{ length: 0, massPerLength: 5 }] }) }),
  400,
  ['out-of-range', '/member/segments/0/length', /length must be above 0 m, but is 0/],
);
bad(
  'a negative foundation',
  'modes',
  modes({ member: cable({ segments: [{ length: 4, massPerLength: 5, foundation: -1 }] }) }),
  400,
  ['out-of-range', '/member/segments/0/foundation', /foundation must be 0 N\/m2 or more, but is -1/],
);
bad(
  'an empty name',
  'modes',
  modes({ member: cable({ segments: [{ length: 4, massPerLength: 5, name: '' }] }) }),
  400,
  ['text-length', '/member/segments/0/name', /1 to 200 characters, but has 0/],
);
bad('a missing mass per length', 'modes', modes({ member: cable({ segments: [{ length: 4 }] }) }), 400, [
  'missing-key',
  '/member/segments/0/massPerLength',
  /massPerLength is missing/,
]);
bad(
  'no ends',
  'modes',
  modes({ member: { ...cable(), ends: {} } }),
  400,
  ['missing-key', '/member/ends/near', /near is missing/],
  ['missing-key', '/member/ends/far', /far is missing/],
);
bad(
  'a name with half a character',
  'modes',
  modes({ member: cable({ segments: [{ length: 4, massPerLength: 5, name: 'saddle \ud83d' }] }) }),
  400,
  ['malformed-text', '/member/segments/0/name', /half of a surrogate pair/],
);
bad(
  'an unknown kind, which leaves open what a rotation is',
  'responses',
  responses({
    member: { ...cable(), kind: 'axle' },
    initial: { displacement: { type: 'half-sine', amplitude: '0.1 rad' } },
  }),
  400,
  ['not-one-of', '/member/kind', /"axle"/],
);
bad(
  'an unknown end',
  'modes',
  modes({ member: cable({ ends: { near: fixed, far: { type: 'pinned' } } }) }),
  400,
  ['not-one-of', '/member/ends/far/type', /"pinned".*fixed, free, attached/],
);
bad(
  'an end without type',
  'modes',
  modes({ member: cable({ ends: { near: fixed, far: { mass: 5 } } }) }),
  400,
  ['missing-key', '/member/ends/far/type', /fixed, free, attached/],
);
bad(
  'a mass on a fixed end',
  'modes',
  modes({ member: cable({ ends: { near: { type: 'fixed', mass: 5 }, far: fixed } }) }),
  400,
  ['unknown-key', '/member/ends/near/mass', /"mass" is not a key here/],
);
bad('an attachment without place', 'modes', modes({ member: cable({ attachments: [{ mass: 3 }] }) }), 400, [
  'missing-key',
  '/member/attachments/0/at',
  /at is missing/,
]);
bad(
  'a negative spring',
  'modes',
  modes({ member: cable({ attachments: [{ at: 3, spring: '-2 kN/m' }] }) }),
  400,
  ['out-of-range', '/member/attachments/0/spring', /spring must be 0 N\/m or more, but is "-2 kN\/m"/],
);
bad('attachments that are an object', 'modes', modes({ member: cable({ attachments: { at: 3 } }) }), 400, [
  'wrong-type',
  '/member/attachments',
  /must be a list, but is an object/,
]);

// Forms of segments
bad('both forms of a bar', 'modes', modes({ member: bar({ ...steelBar, axialStiffness: 2e9 }) }), 400, [
  'other-form',
  '/member/segments/0/axialStiffness',
  /not belong to the form youngsModulus \+ area \+ density.*axialStiffness \+ massPerLength/,
]);
bad('an incomplete form of a bar', 'modes', modes({ member: bar({ youngsModulus: 2e11, area: 0.1 }) }), 400, [
  'missing-key',
  '/member/segments/0/density',
  /density is missing for the form youngsModulus \+ area \+ density/,
]);
bad('a bar in no form', 'modes', modes({ member: bar({}) }), 400, [
  'form-missing',
  '/member/segments/0',
  /axialStiffness \+ massPerLength; or youngsModulus \+ area \+ density/,
]);
bad('a shaft described as a bar', 'modes', modes({ member: shaft({ ...steelShaft, area: 0.1 }) }), 400, [
  'unknown-key',
  '/member/segments/0/area',
  /"area" is not a key here.*torsionalStiffness/,
]);
bad(
  'a shaft without density',
  'modes',
  modes({ member: shaft({ shearModulus: 8e10, outerDiameter: 0.1 }) }),
  400,
  ['missing-key', '/member/segments/0/density', /form shearModulus \+ density \+ outerDiameter/],
);
bad(
  'mass on a shaft',
  'modes',
  modes({ member: shaft(steelShaft, { attachments: [{ at: 1, mass: 3 }] }) }),
  400,
  ['unknown-key', '/member/attachments/0/mass', /Did you mean inertia\?/],
);
bad(
  'mass at a shaft end',
  'modes',
  modes({ member: shaft(steelShaft, { ends: { near: free, far: { type: 'attached', mass: 3 } } }) }),
  400,
  ['unknown-key', '/member/ends/far/mass', /Did you mean inertia\?/],
);
bad('inertia on a cable', 'modes', modes({ member: cable({ attachments: [{ at: 1, inertia: 3 }] }) }), 400, [
  'unknown-key',
  '/member/attachments/0/inertia',
  /Did you mean mass\?/,
]);
bad(
  'two forms of a soil layer',
  'modes',
  modes({ member: column({ shearWaveSpeed: 200, shearModulus: 8e7, density: 1900 }) }),
  400,
  [
    'other-form',
    '/member/segments/0/shearWaveSpeed',
    /shearWaveSpeed does not belong to the form shearModulus \+ density/,
  ],
);
bad(
  'a soil layer without mass behind its wave speed',
  'modes',
  modes({ member: column({ shearWaveSpeed: 200, density: 0 }) }),
  400,
  ['out-of-range', '/member/segments/0/density', /density must be above 0 kg\/m3/],
);

// Quantities and units
const long = (length: unknown): Changes =>
  modes({ member: cable({ segments: [{ length, massPerLength: 58 }] }) });
const lengthAt = '/member/segments/0/length';
bad('a unit of another dimension', 'modes', long('45 kg'), 400, [
  'unit-dimension',
  lengthAt,
  /"45 kg" is a mass, but a length is wanted here: in m, mm/,
]);
bad('a unit in the wrong case', 'modes', modes({ member: cable({ tension: '2.4 KN' }) }), 400, [
  'unit-unknown',
  '/member/tension',
  /KN in "2.4 KN".*Did you mean kN\?.*a force: N, kN, MN/,
]);
bad('an unknown unit', 'modes', long('45 furlongs'), 400, [
  'unit-unknown',
  lengthAt,
  /furlongs.*a length: m, mm, cm, km, \[in_i\], \[ft_i\]/,
]);
bad('a text without unit', 'modes', long('45'), 400, [
  'unit-missing',
  lengthAt,
  /"45" has no unit. Write the plain number 45 \(without quotes\) for m/,
]);
bad('a decimal comma', 'modes', long('1,5 m'), 400, [
  'quantity-unreadable',
  lengthAt,
  /"1,5 m".*decimal point/,
]);
bad('a thousands separator', 'modes', long('1 500 m'), 400, ['quantity-unreadable', lengthAt, /"1 500 m"/]);
bad('a unit before the number', 'modes', long('m 45'), 400, [
  'quantity-unreadable',
  lengthAt,
  /such as "12.5 m"/,
]);
bad('an empty text', 'modes', long(''), 400, [
  'quantity-unreadable',
  lengthAt,
  /"" is not a number and a unit/,
]);
bad('an exponent without end', 'modes', long('1e400 m'), 400, [
  'number-magnitude',
  lengthAt,
  /"1e400 m".*1e60/,
]);
bad('a length beyond reason', 'modes', long(1e61), 400, ['number-magnitude', lengthAt, /1e\+61.*1e60/]);
bad('a length below reason', 'modes', long(1e-61), 400, ['number-magnitude', lengthAt, /1e-61.*1e-60/]);
bad('null for a length', 'modes', long(null), 400, [
  'wrong-type',
  lengthAt,
  /must be a number in m, or a text with a unit such as "12.5 m", but is null/,
]);
bad('an object for a length', 'modes', long({ value: 3, unit: 'm' }), 400, [
  'wrong-type',
  lengthAt,
  /but is an object/,
]);
bad('angular frequency for a frequency', 'modes', modes({ series: { upTo: '30 rad/s' } }), 400, [
  'unit-dimension',
  '/series/upTo',
  /"30 rad\/s" is an angular velocity, but a frequency is wanted here: in Hz/,
]);
bad(
  'a frequency for an angular velocity',
  'responses',
  responses({
    member: shaft(steelShaft),
    initial: { velocity: { type: 'uniform', value: '3 Hz', from: 1 } },
  }),
  400,
  ['unit-dimension', '/initial/velocity/value', /"3 Hz" is a frequency, but an angular velocity/],
);
bad(
  'a length for a rotation',
  'responses',
  responses({
    member: shaft(steelShaft),
    initial: { displacement: { type: 'half-sine', amplitude: '3 mm' } },
  }),
  400,
  [
    'unit-dimension',
    '/initial/displacement/amplitude',
    /"3 mm" is a length, but an angle is wanted here: in rad/,
  ],
);
bad('a rotation for a length', 'responses', moved([{ type: 'half-sine', amplitude: '0.1 rad' }]), 400, [
  'unit-dimension',
  '/initial/displacement/0/amplitude',
  /an angle, but a length is wanted/,
]);
bad(
  'a displacement for a velocity',
  'responses',
  responses({ initial: { velocity: { type: 'half-sine', amplitude: '1 mm' } } }),
  400,
  ['unit-dimension', '/initial/velocity/amplitude', /a length, but a speed is wanted here: in m\/s/],
);
bad(
  'a coefficient in the unit of another',
  'responses',
  moved({ type: 'polynomial', coefficients: [0, '1 mm/m', '1 mm/m'] }),
  400,
  ['unit-dimension', '/initial/displacement/coefficients/2', /a length per m2 is wanted here: in m\/m2/],
);

// Damping
bad('an unknown damping', 'modes', modes({ member: cable({ damping: { type: 'viscous' } }) }), 400, [
  'not-one-of',
  '/member/damping/type',
  /"viscous".*ratio, ratios, rayleigh, loss-factor/,
]);
bad(
  'a damping ratio with a unit',
  'modes',
  modes({ member: cable({ damping: { type: 'ratio', value: '0.4 %' } }) }),
  400,
  ['wrong-type', '/member/damping/value', /value must be a number, but is "0.4 %"/],
);
bad(
  'a negative ratio in a list',
  'modes',
  modes({ member: cable({ damping: { type: 'ratios', values: [0.01, -0.01] } }) }),
  400,
  ['out-of-range', '/member/damping/values/1', /item 1 of values must be 0 or more, but is -0.01/],
);
bad(
  'half of a Rayleigh damping',
  'modes',
  modes({ member: cable({ damping: { type: 'rayleigh', massCoefficient: 1 } }) }),
  400,
  ['missing-key', '/member/damping/stiffnessCoefficient', /stiffnessCoefficient is missing. β, s/],
);

// Series
bad('no mode', 'modes', modes({ series: { modes: 0 } }), 400, [
  'out-of-range',
  '/series/modes',
  /modes must be 1 or more, but is 0/,
]);
bad('more modes than are taken', 'modes', modes({ series: { modes: 20001 } }), 400, [
  'out-of-range',
  '/series/modes',
  /at most 20000, but is 20001/,
]);
bad('a fraction of a mode', 'modes', modes({ series: { modes: 2.5 } }), 400, [
  'wrong-type',
  '/series/modes',
  /an integer, but is 2.5/,
]);
bad('a number of modes in quotes', 'modes', modes({ series: { modes: '12' } }), 400, [
  'wrong-type',
  '/series/modes',
  /Write the number without quotes/,
]);
bad('two ways to choose modes', 'modes', modes({ series: { modes: 3, upTo: 50 } }), 400, [
  'other-form',
  '/series/upTo',
  /upTo does not belong to the form modes/,
]);
bad('no way to choose modes', 'modes', modes({ series: {} }), 400, [
  'form-missing',
  '/series',
  /modes; or upTo/,
]);
bad('a frequency limit for responses', 'responses', responses({ series: { upTo: 50 } }), 400, [
  'unknown-key',
  '/series/upTo',
  /modes, relativeTolerance, maxModes, tolerances/,
]);
bad(
  'a relative tolerance above the whole',
  'responses',
  responses({ series: { relativeTolerance: 2 } }),
  400,
  ['out-of-range', '/series/relativeTolerance', /at most 1, but is 2/],
);
bad('no tolerance', 'responses', responses({ series: { tolerances: {} } }), 400, [
  'nothing-given',
  '/series/tolerances',
  /displacement, force/,
]);
bad(
  'a tolerance of the wrong dimension',
  'responses',
  responses({ series: { tolerances: { force: '1 mm' } } }),
  400,
  ['unit-dimension', '/series/tolerances/force', /a length, but a force is wanted/],
);

// Initial motion
bad('an unknown shape', 'responses', moved({ type: 'sine', amplitude: 1 }), 400, [
  'not-one-of',
  '/initial/displacement/type',
  /"sine".*pull, half-sine, polyline, polynomial, uniform/,
]);
bad('no shapes in a list', 'responses', moved([]), 400, [
  'too-few-items',
  '/initial/displacement',
  /at least 1/,
]);
bad('a shape that is a number', 'responses', moved(0.02), 400, [
  'wrong-type',
  '/initial/displacement',
  /must be an object or a list, but is 0.02/,
]);
bad(
  'a pull by amplitude and force',
  'responses',
  moved({ type: 'pull', at: 15, amplitude: 1, force: 1 }),
  400,
  ['other-form', '/initial/displacement/force', /force does not belong to the form amplitude/],
);
bad('a pull by nothing', 'responses', moved({ type: 'pull', at: 15 }), 400, [
  'form-missing',
  '/initial/displacement',
  /amplitude; or force/,
]);
bad(
  'too many coefficients',
  'responses',
  moved({ type: 'polynomial', coefficients: Array.from({ length: 22 }, () => 0) }),
  400,
  ['too-many-items', '/initial/displacement/coefficients', /22 items; at most 21/],
);
bad(
  'a polyline of one point',
  'responses',
  moved({ type: 'polyline', positions: [1], values: [0] }),
  400,
  ['too-few-items', '/initial/displacement/positions', /1 items, but needs at least 2/],
  ['too-few-items', '/initial/displacement/values', /1 items, but needs at least 2/],
);
bad('half a half wave', 'responses', moved({ type: 'half-sine', amplitude: 1, halfWaves: 0.5 }), 400, [
  'wrong-type',
  '/initial/displacement/halfWaves',
  /an integer, but is 0.5/,
]);
bad(
  'a width of nothing',
  'responses',
  responses({ initial: { impulses: [{ at: 3, impulse: 1, width: 0 }] } }),
  400,
  ['out-of-range', '/initial/impulses/0/width', /width must be above 0 m/],
);

// Sample
bad('no times', 'responses', responses({ sample: {} }), 400, [
  'missing-key',
  '/sample/times',
  /times is missing/,
]);
bad('a grid of one position', 'responses', sampled({ positions: { count: 1 } }), 400, [
  'out-of-range',
  '/sample/positions/count',
  /count must be 2 or more, but is 1/,
]);
bad('an unknown quantity', 'responses', sampled({ quantities: ['displacement', 'strain'] }), 400, [
  'not-one-of',
  '/sample/quantities/1',
  /"strain".*displacement, velocity, acceleration, force, stress/,
]);
bad('a quantity twice', 'responses', sampled({ quantities: ['force', 'force'] }), 400, [
  'repeated-item',
  '/sample/quantities/1',
  /holds "force" twice/,
]);
bad('no quantity', 'responses', sampled({ quantities: [] }), 400, [
  'too-few-items',
  '/sample/quantities',
  /at least 1/,
]);
bad('a negative position', 'responses', sampled({ positions: [1, -2, '3 mm'] }), 400, [
  'out-of-range',
  '/sample/positions/1',
  /item 1 of positions must be 0 m or more, but is -2/,
]);
bad('a negative time', 'responses', responses({ sample: { times: ['-3 ms', 4] } }), 400, [
  'out-of-range',
  '/sample/times/0',
  /item 0 of times must be 0 s or more, but is "-3 ms"/,
]);
bad('an unknown normalisation', 'modes', modes({ shapes: { positions: [1], normalisation: 'max' } }), 400, [
  'not-one-of',
  '/shapes/normalisation',
  /"max".*mass, peak/,
]);
bad('unknown moving ends', 'modes', modes({ participation: { ends: 'all' } }), 400, [
  'not-one-of',
  '/participation/ends',
  /"all".*near, far, both, uniform/,
]);

// Parts that do not fit together
bad(
  'an attachment beyond the member',
  'modes',
  modes({ member: cable({ attachments: [{ at: 46, mass: 1 }] }) }),
  422,
  ['attachment-outside', '/member/attachments/0/at', /46 m.*45 m/],
);
bad(
  'an attachment at the far end',
  'modes',
  modes({ member: cable({ attachments: [{ at: 45, mass: 1 }] }) }),
  422,
  ['attachment-at-end', '/member/attachments/0/at', /far end.*"ends": \{"far": \{"type": "attached"/],
);
bad('a shaft without wall', 'modes', modes({ member: shaft({ ...steelShaft, innerDiameter: 0.1 }) }), 422, [
  'inner-diameter-too-large',
  '/member/segments/0/innerDiameter',
  /inner diameter 0.1 m is not below the outer diameter 0.1 m/,
]);
bad(
  'no inertia anywhere',
  'modes',
  modes({ member: cable({ segments: [{ length: 4, massPerLength: 0 }] }) }),
  422,
  ['no-inertia', '/member', /at least one segment or attachment a mass/],
);
bad(
  'drag on nothing',
  'modes',
  modes({
    member: cable({
      segments: [{ length: 4, massPerLength: 0, drag: 2 }],
      attachments: [{ at: 2, mass: 1 }],
    }),
  }),
  422,
  ['drag-without-inertia', '/member/segments/0/drag', /drag 2 but no inertia/],
);
bad('a dashpot', 'modes', modes({ member: cable({ attachments: [{ at: 2, dashpot: '3 kN.s/m' }] }) }), 422, [
  'dashpot-unsupported',
  '/member/attachments/0/dashpot',
  /dashpot 3000 needs complex modes/,
]);
bad(
  'a dashpot beside modal damping',
  'responses',
  responses({
    member: cable({
      ends: { near: fixed, far: { type: 'attached', dashpot: 3 } },
      damping: { type: 'ratio', value: 0.01 },
    }),
  }),
  422,
  ['dashpot-unsupported', '/member/ends/far/dashpot', /complex modes/],
  ['damping-mixed', '/member/damping', /"type": "ratio".*dashpot/],
);
bad(
  'drag beside a mass',
  'modes',
  modes({
    member: cable({
      segments: [{ length: 45, massPerLength: 58, drag: 2 }],
      attachments: [{ at: 2, mass: 3 }],
    }),
  }),
  422,
  ['drag-not-modal', '/member/segments/0/drag', /same multiple of the inertia/],
);
bad(
  'a loss factor in time',
  'responses',
  responses({ member: cable({ damping: { type: 'loss-factor', value: 0.02 } }) }),
  422,
  ['loss-factor-in-time', '/member/damping', /"ratio", "value": 0.01/],
);
bad('a pull beyond the member', 'responses', moved({ type: 'pull', at: 50, amplitude: 1 }), 422, [
  'position-outside',
  '/initial/displacement/at',
  /50 m lies beyond.*45 m/,
]);
bad('a pull on a fixed end', 'responses', moved([{ type: 'pull', at: 45, amplitude: 1 }]), 422, [
  'pull-at-fixed-end',
  '/initial/displacement/0/at',
  /45 m acts on a fixed end/,
]);
bad(
  'a force in a velocity',
  'responses',
  responses({ initial: { velocity: { type: 'pull', at: 5, force: 1 } } }),
  422,
  ['force-in-velocity', '/initial/velocity/force', /given by a force. Give its amplitude/],
);
bad(
  'a polyline that turns back',
  'responses',
  moved({ type: 'polyline', positions: [0, 5, 5, 45], values: [0, 1, 1, 0] }),
  422,
  [
    'positions-not-ascending',
    '/initial/displacement/positions/2',
    /5 m does not lie beyond the one before it \(5 m\)/,
  ],
);
bad(
  'a polyline of unequal lists',
  'responses',
  moved({ type: 'polyline', positions: [0, 5, 45], values: [0, 1] }),
  422,
  ['lengths-differ', '/initial/displacement/values', /3 positions and 2 values/],
);
bad(
  'a polyline beyond the member',
  'responses',
  moved({ type: 'polyline', positions: [0, 5, 46], values: [0, 1, 0] }),
  422,
  ['position-outside', '/initial/displacement/positions/2', /46 m/],
);
bad('a stretch from behind', 'responses', moved({ type: 'uniform', value: 1, from: 5, to: 4 }), 422, [
  'stretch-empty',
  '/initial/displacement/to',
  /from 5 m to 4 m is empty/,
]);
bad(
  'a stretch from the far end on',
  'responses',
  moved({ type: 'polynomial', coefficients: [1], from: 45 }),
  422,
  ['stretch-empty', '/initial/displacement/from', /from 45 m to 45 m is empty/],
);
bad(
  'two velocities of one mass',
  'responses',
  responses({
    initial: {
      massVelocities: [
        { at: 5, velocity: 1 },
        { at: 5, velocity: 2 },
      ],
    },
  }),
  422,
  ['repeated-mass-velocity', '/initial/massVelocities/1/at', /mass at 5 m is given a velocity twice/],
);
bad(
  'an impulse that reaches beyond the end',
  'responses',
  responses({ initial: { impulses: [{ at: 1, impulse: 1, width: 4 }] } }),
  422,
  ['width-outside', '/initial/impulses/0/width', /1 m with width 4 m/],
);
bad('a sample beyond the member', 'responses', sampled({ positions: [0, 45, 45.1] }), 422, [
  'position-outside',
  '/sample/positions/2',
  /45.1 m/,
]);
bad('shapes beyond the member', 'modes', modes({ shapes: { positions: ['46 m'] } }), 422, [
  'position-outside',
  '/shapes/positions/0',
  /46 m/,
]);
bad('times that turn back', 'responses', responses({ sample: { times: [0, 2, 1] } }), 422, [
  'times-not-ascending',
  '/sample/times/2',
  /1 s does not come after the one before it \(2 s\)/,
]);
bad(
  'a time span that ends before its start',
  'responses',
  responses({ sample: { times: { start: 3, end: 2, count: 5 } } }),
  422,
  ['time-span-empty', '/sample/times/end', /end at 2 s, not after their start at 3 s/],
);
bad(
  'more values than one answer holds',
  'responses',
  sampled({ positions: { count: 1001 }, times: { end: 1, count: 1000 } }),
  422,
  ['too-many-values', '/sample', /1001000 numbers.*1001 positions × 1000 times × 1 quantities.*1000000/],
);
bad(
  'more shape values than one answer holds',
  'modes',
  modes({ series: { modes: 20000 }, shapes: { positions: { count: 101 } } }),
  422,
  ['too-many-values', '/shapes', /101 positions × 20000 modes/],
);
bad('a uniform motion of a fixed member', 'modes', modes({ participation: { ends: 'uniform' } }), 422, [
  'uniform-motion-held',
  '/participation/ends',
  /near end is fixed/,
]);

bad(
  'a moving end that is not held',
  'modes',
  modes({ member: cable({ ends: { near: fixed, far: free } }), participation: { ends: 'both' } }),
  422,
  ['moving-end-not-fixed', '/participation/ends', /the far end as a support.*not fixed/],
);

// Several faults at once
bad(
  'two faults of form',
  'modes',
  modes({ member: cable({ tension: '3 m' }), series: { modes: -1 } }),
  400,
  ['unit-dimension', '/member/tension', /a length, but a force/],
  ['out-of-range', '/series/modes', /1 or more, but is -1/],
);
bad(
  'a fault of form beside one of sense',
  'responses',
  responses({ checks: 1, sample: { times: [0], positions: [46] } }),
  400,
  ['wrong-type', '/checks', /true or false/],
  ['position-outside', '/sample/positions/0', /46 m/],
);
bad(
  'two faults of sense',
  'responses',
  {
    member: cable({ attachments: [{ at: 3, dashpot: 2 }] }),
    initial: { displacement: { type: 'pull', at: 47, amplitude: 1 } },
    sample: { times: [0] },
  },
  422,
  ['dashpot-unsupported', '/member/attachments/0/dashpot', /dashpot 2/],
  ['position-outside', '/initial/displacement/at', /47 m/],
);

export const badRequests: readonly BadRequest[] = [...rows, ...badLoadRequests];
