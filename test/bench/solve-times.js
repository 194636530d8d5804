import { operations } from '../../dist/pool/operations.js';
import { modesRequest, responsesRequest } from './reference-member.js';
import { alternate, fixed, printTable } from './timing.js';

/** Reference of the run: JSON.stringify of 80,000 doubles, a task of about 13 ms that touches no code of ours. */
const doubles = Array.from({ length: 80_000 }, (_, i) => Math.sin(i) * 10 ** ((i % 9) - 4));
const reference = () => JSON.stringify(doubles);

export function solveTimes() {
  const solve = (name, request) => {
    const canonical = operations[name].read(request);
    return () => operations[name].solve(canonical);
  };
  const rows = [64, 1000, 10_000].map((modes) => {
    const times = alternate({ solve: solve('modes', modesRequest(modes)), reference }, modes > 1000 ? 5 : 15);
    const perMode = (times.solve / modes) * 1000;
    return {
      modes,
      times,
      cells: [`modes, ${modes}`, fixed(times.solve), fixed(perMode, 1), fixed(times.solve / times.reference)],
    };
  });
  if (operations.responses !== undefined) {
    for (const [modes, positions, instants] of [
      [64, 101, 1],
      [64, 200, 400],
      [256, 200, 400],
    ]) {
      const times = alternate(
        { solve: solve('responses', responsesRequest(modes, positions, instants)), reference },
        7,
      );
      rows.push({
        cells: [
          `responses, ${modes} modes, ${positions} × ${instants}`,
          fixed(times.solve),
          fixed((times.solve / modes) * 1000, 1),
          fixed(times.solve / times.reference),
        ],
      });
    }
  }
  printTable(
    'Solve times, 20-segment member with an attached mass (one thread)',
    ['solve', 'ms', 'µs per mode', '× 80,000 doubles to JSON'],
    rows.map(({ cells }) => cells),
  );
  console.log(
    `time(10,000 modes) / time(1,000 modes) = ${fixed(rows[2].times.solve / rows[1].times.solve, 1)}`,
  );
}
