import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readRequest } from '../../src/contract/read-request.ts';
import { validatorOf } from '../../src/contract/validators.ts';
import { encodeJson } from '../../src/encoding/json.ts';
import { solveChecks } from '../../src/solutions/checks.ts';
import type { ChecksAnswer } from '../../src/spec/types.ts';

function checksOf(file: string): ChecksAnswer {
  const text = readFileSync(new URL(`../../schemas/examples/${file}`, import.meta.url), 'utf8');
  const answer = solveChecks(readRequest('checks', JSON.parse(text)));
  const seen = JSON.parse(new TextDecoder().decode(encodeJson(answer))) as ChecksAnswer;
  const validate = validatorOf('ChecksAnswer');
  validate.call({ kind: 'cable', document: null, originals: new Map() }, seen);
  expect(validate.errors ?? []).toEqual([]);
  return seen;
}

describe('the examples of checks', () => {
  it('a hanger of a footbridge passes all of its criteria', () => {
    const { verdict, criteria, convergence } = checksOf('footbridge-hanger-checks.json');
    expect(verdict).toBe('pass');
    expect(convergence).toMatchObject({ verdict: 'converged' });
    const [sway, lamp, , first] = criteria;
    // Static sag of a taut string under the pull, F x (L − x)/(T L): the lamp is let go from there.
    const sag = (600 * 2.1 * 5.3) / (85e3 * 7.4);
    expect(lamp.demand! / sag).toBeCloseTo(1, 3);
    expect(sway.demand! + sway.bound!).toBeGreaterThanOrEqual(lamp.demand!);
    // The taut string without its lamp is quicker.
    expect(first.demand!).toBeLessThan(Math.sqrt(85e3 / 4.9) / (2 * 7.4));
    expect(first.demand!).toBeGreaterThan((0.9 * Math.sqrt(85e3 / 4.9)) / (2 * 7.4));
  });

  it('a pump shaft keeps its torque over the whole band', () => {
    const { verdict, criteria } = checksOf('pump-shaft-checks.json');
    expect(verdict).toBe('pass');
    // A disc on two shafts in series, a third of their inertia left out: √(k/J)/(2π).
    const polar = (diameter: number) => (Math.PI / 32) * diameter ** 4;
    const flexibility = 0.9 / (80e9 * polar(0.06)) + 0.6 / (80e9 * polar(0.05));
    expect(criteria[2].demand! / (1 / (2 * Math.PI * Math.sqrt(0.32 * flexibility)))).toBeCloseTo(1, 2);
  });
});
