export const record = {
  interval: 0.005,
  samples: 100_000,
  instants: 5000,
  stride: 20,
  modes: 60,
  stations: 5,
};

/** 12 layers, softer towards the surface at x = L, on a base that shakes. */
const member = {
  kind: 'shear-column',
  segments: Array.from({ length: 12 }, (_, i) => ({
    length: 3 + ((5 * i) % 7) / 2,
    shearWaveSpeed: 620 - 38 * i + 25 * Math.sin(3 * i),
    density: 2100 - 30 * i,
  })),
  ends: { near: { type: 'fixed' }, far: { type: 'free' } },
  damping: { type: 'ratio', value: 0.05 },
};

/** Noise that is the same in every run (a linear congruential generator), swelling and fading, m/s². */
function noise() {
  let seed = 12345;
  return Array.from({ length: record.samples }, (_, i) => {
    seed = (1664525 * seed + 1013904223) % 2 ** 32;
    return (seed / 2 ** 31 - 1) * Math.sin((Math.PI * i) / (record.samples - 1)) ** 2;
  });
}

/** The column under the record of its base; its times are every 20th sample of the record. */
export function recordRequest(quantities, checks) {
  const { interval, stride, instants, modes, stations } = record;
  const history = { type: 'samples', interval, values: noise() };
  return {
    member,
    loads: [{ type: 'end-motion', end: 'near', quantity: 'acceleration', history }],
    series: { modes },
    sample: {
      positions: { count: stations },
      times: { start: 0, end: stride * interval * (instants - 1), count: instants },
      quantities,
    },
    checks,
  };
}

/** The modes of the column with what a base motion and the stations have of them. */
export function recordModesRequest() {
  const { modes, stations } = record;
  return {
    member,
    series: { modes },
    shapes: { positions: { count: stations }, quantities: ['displacement', 'force'] },
    participation: { ends: 'near' },
  };
}
