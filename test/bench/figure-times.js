import { encodeJson } from '../../dist/encoding/json.js';
import { drawFigure } from '../../dist/figures/draw-figure.js';
import { rasterise } from '../../dist/figures/rasterise.js';
import { viewsOf } from '../../dist/figures/views.js';
import { operations } from '../../dist/pool/operations.js';
import { modesRequest, referenceMember, responsesRequest } from './reference-member.js';
import { alternate, fixed, printTable } from './timing.js';

const size = { width: 960, height: 540, theme: 'light' };

/** Figures of warm answers against JSON of the same answer; the goal is four times that, or 50 ms. */
export function figureTimes() {
  const rows = Object.entries(bodies()).flatMap(([name, [operation, body]]) => {
    const request = operations[operation].read(body);
    const answer = operations[operation].solve(request);
    return viewsOf[operation].map((view) => {
      const options = { ...size, view };
      const svg = drawFigure(operation, request, answer, options);
      const times = alternate(
        {
          json: () => encodeJson(answer),
          svg: () => drawFigure(operation, request, answer, options),
          png: () => rasterise(svg),
        },
        9,
      );
      const most = Math.max(4 * times.json, 50);
      const whole = times.svg + times.png;
      return [
        `${name}, ${view}`,
        fixed(times.json),
        fixed(times.svg),
        fixed(whole),
        fixed(times.svg / most),
        fixed(whole / most),
      ];
    });
  });
  printTable(
    `Figures of ${size.width} × ${size.height} px (goal: below 1 of the larger of 4 × JSON and 50 ms)`,
    ['answer, view', 'JSON ms', 'SVG ms', 'PNG ms', 'SVG / goal', 'PNG / goal'],
    rows,
  );
}

function bodies() {
  const responses = responsesRequest(64, 101, 401);
  responses.sample.quantities = ['displacement', 'force'];
  responses.sample.gaugeTime = 1e-4;
  const large = responsesRequest(64, 250, 2000);
  large.sample.quantities = ['displacement', 'force'];
  return {
    '40 modes': [
      'modes',
      modesRequest(40, { shapes: { positions: { count: 101 } }, participation: { ends: 'near' } }),
    ],
    '401 × 101 samples': ['responses', responses],
    '2000 × 250 samples': ['responses', large],
    '2000 frequencies': [
      'transfer-functions',
      {
        member: { ...referenceMember(), damping: { type: 'loss-factor', value: 0.02 } },
        input: { type: 'point-force', at: 5 },
        outputs: [
          { at: 5, quantity: 'displacement' },
          { at: 10, quantity: 'displacement' },
        ],
        frequencies: { from: 1, to: 500, count: 2000 },
      },
    ],
  };
}
