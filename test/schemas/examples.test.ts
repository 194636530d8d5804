import { execFileSync } from 'node:child_process';
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readRequest } from '../../src/contract/read-request.ts';
import { validatorOf } from '../../src/contract/validators.ts';
import { encodeJson } from '../../src/encoding/json.ts';
import { solveModes } from '../../src/solutions/modes.ts';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { EndMotion, ModesAnswer, ResponsesAnswer, SampledHistory } from '../../src/spec/types.ts';

const folder = new URL('../../schemas/examples/', import.meta.url);
const files = readdirSync(folder);
const load = (file: string): Record<string, unknown> =>
  JSON.parse(readFileSync(new URL(file, folder), 'utf8')) as Record<string, unknown>;

/** An answer as a client sees it; it must satisfy its schema. */
function published(schema: string, answer: unknown): unknown {
  const seen = JSON.parse(new TextDecoder().decode(encodeJson(answer))) as unknown;
  const validate = validatorOf(schema);
  validate.call({ kind: 'cable', originals: new Map() }, seen);
  expect(validate.errors ?? []).toEqual([]);
  return seen;
}

const modesOf = (file: string): ModesAnswer =>
  published('ModesAnswer', solveModes(readRequest('modes', load(file)))) as ModesAnswer;
const responsesOf = (file: string): ResponsesAnswer =>
  published('ResponsesAnswer', solveResponses(readRequest('responses', load(file)))) as ResponsesAnswer;
const firstFrequency = (file: string): number =>
  solveModes(readRequest('modes', { member: load(file).member, series: { modes: 1 } })).modes[0].frequency;

describe('the examples', () => {
  it('cover numbers in SI and texts with units', () => {
    const texts = files.map((file) => readFileSync(new URL(file, folder), 'utf8'));
    expect(texts.some((text) => /"\d[\d.]* [A-Za-z]/.test(text))).toBe(true);
    expect(texts.some((text) => !/"\d[\d.]* [A-Za-z]/.test(text))).toBe(true);
    expect(files).toHaveLength(11);
  });

  it('the record of the shaken soil column is the one that its script makes, and says that it is made up', () => {
    const script = new URL('../../schemas/scripts/synthesise-record.mjs', import.meta.url).pathname;
    const file = new URL('shaken-soil-column.json', folder).pathname;
    expect(() => execFileSync(process.execPath, [script, file], { stdio: 'pipe' })).not.toThrow();
    const { loads } = readRequest('responses', load('shaken-soil-column.json'));
    const { history } = loads[0] as EndMotion;
    expect((history as SampledHistory).name).toMatch(/made-up/);
    // Of the size of a moderate earthquake: peak below 2 m/s², and at rest again at the end.
    const { interval, values } = history as SampledHistory;
    expect(Math.max(...values.map(Math.abs))).toBe(1.6);
    expect(Math.abs(interval * values.reduce((sum, value) => sum + value, 0))).toBeLessThan(1e-3);
  });

  it('a stay cable, pulled and released, converges and stays below its ceiling', () => {
    const { convergence, peaks } = responsesOf('stay-cable-release.json');
    expect(convergence.verdict).toBe('converged');
    expect(convergence.displacementBound).toBeLessThanOrEqual(1e-3 * convergence.ceiling!);
    // Static sag of a taut string under a point force: F x (L − x)/(T L), fixed ends.
    const sag = (12e3 * 21.6 * (86.4 - 21.6)) / (3.15e6 * 86.4);
    expect(peaks.displacement!.value / sag).toBeCloseTo(1, 1);
    // Taut string of the mean mass: √(T/m)/(2L); the clamp and the soft end lower it a little.
    const taut = Math.sqrt(3.15e6 / 62.1) / (2 * 86.4);
    expect(firstFrequency('stay-cable-release.json') / taut).toBeCloseTo(1, 1);
  });

  it('a tie rod with an end mass swings near the frequency of its mass on its stiffness', () => {
    const { convergence, fields } = responsesOf('tie-rod-end-mass.json');
    expect(convergence.verdict).toBe('converged');
    expect(fields.stress!.unit).toBe('Pa');
    // Rayleigh's rule: a third of the rod goes with the mass (The Theory of Sound, vol. 1, from memory).
    const flexibility = 9.2 / (205e9 * 2124e-6) + 0.3 / (205e9 * 2827e-6);
    const rod = 7850 * (9.2 * 2124e-6 + 0.3 * 2827e-6);
    const swing = 1 / (2 * Math.PI * Math.sqrt(flexibility * (640 + rod / 3)));
    expect(firstFrequency('tie-rod-end-mass.json') / swing).toBeCloseTo(1, 2);
  });

  it('a pile struck by a ram starts with the impedance of its head', () => {
    const { fields, convergence } = responsesOf('struck-pile.json');
    // Energy of the ram: M v²/2.
    expect(convergence.energy.total / ((4800 * 3.6 ** 2) / 2)).toBeCloseTo(1, 12);
    // St. Venant's impact (Timoshenko and Goodier, Theory of Elasticity, from memory): the head force jumps to v·√(E density)·A and decays as exp(−Z t/M).
    const impedance = Math.sqrt(210e9 * 7850) * 0.0238;
    const time = 1e-3;
    const column = fields.force!.values[Math.round(time / 5e-5)];
    expect(fields.times[20]).toBeCloseTo(time, 12);
    const expected = -3.6 * impedance * Math.exp((-impedance * time) / 4800);
    expect(column[0] / expected).toBeCloseTo(1, 1);
  });

  it('a stepped drive shaft with two discs twists between them', () => {
    const { convergence, peaks } = responsesOf('stepped-drive-shaft.json');
    expect(convergence.verdict).toBe('converged');
    // Static twist at the flywheel: torque · (coupling + both shafts up to it).
    const polar = (outer: number, inner: number) => (Math.PI / 32) * (outer ** 4 - inner ** 4);
    const flexibility = 1 / 3.4e5 + 0.62 / (79.3e9 * polar(0.085, 0)) + 1.15 / (79.3e9 * polar(0.11, 0.04));
    expect(Math.abs(peaks.displacement!.value) / (2400 * flexibility)).toBeCloseTo(1, 3);
  });

  it('a layered soil column has all its modes up to 25 Hz and most of its mass in the first', () => {
    const { modes, convergence, shapes, member } = modesOf('layered-soil-modes.json');
    expect(convergence.spectrumComplete).toBe(true);
    expect(shapes!.positions).toHaveLength(69);
    expect(modes.every(({ frequency }) => frequency <= 25)).toBe(true);
    // A uniform layer of the same travel time has f₁ = 1/(4 × travel time); soft layers on top raise it.
    const uniform = 1 / (4 * member.travelTime);
    expect(modes[0].frequency).toBeGreaterThan(uniform);
    expect(modes[0].frequency).toBeLessThan(1.5 * uniform);
    expect(modes[0].participation!.effectiveMassFraction).toBeGreaterThan(0.5);
    for (const { energyShares } of modes) {
      const { segments, attachments, ends } = energyShares!;
      const sum = [...segments, ...attachments, ...ends].reduce((total, share) => total + share, 0);
      expect(sum).toBeCloseTo(1, 12);
    }
  });
});
