import { describe, expect, it } from 'vitest';
import { type Operation, readRequest } from '../../src/contract/read-request.ts';
import { Fault } from '../../src/faults/fault.ts';
import { formFaultWordings } from '../../src/faults/form-faults.ts';
import { badRequests } from './bad-requests.ts';
import { cable, modes } from './request-cases.ts';

function faultsOf(operation: Operation, body: unknown): Fault['records'] {
  try {
    readRequest(operation, body);
    return [];
  } catch (error) {
    if (error instanceof Fault) return error.records;
    throw error;
  }
}

describe('a wrong request is answered with exactly its faults', () => {
  it.each(badRequests.map((row) => [row.title, row] as const))('%s', (_title, row) => {
    const records = faultsOf(row.operation, row.body);
    expect(records.map(({ code, pointer }) => [code, pointer])).toEqual(
      row.faults.map(({ code, pointer }) => [code, pointer]),
    );
    row.faults.forEach(({ wording }, index) => expect(records[index].detail).toMatch(wording));
    const form = records.some(({ code }) => code in formFaultWordings);
    expect(form ? 400 : 422).toBe(row.status);
    for (const { detail } of records) expect(detail).not.toMatch(/undefined|\{\w+\}|\?\s*$|\[object/);
  });

  it('every body can be sent as JSON', () => {
    for (const { body } of badRequests) expect(JSON.parse(JSON.stringify(body))).toEqual(body);
  });

  it('no title stands twice and there are well over a hundred', () => {
    expect(new Set(badRequests.map(({ title }) => title)).size).toBe(badRequests.length);
    expect(badRequests.length).toBeGreaterThanOrEqual(200);
  });

  it('nothing about bars is said of a shaft, whatever its segment holds', () => {
    for (const key of ['massPerLength', 'mass', 'axialStiffness', 'youngsModulus', 'area', 'tension']) {
      const segment = { length: 1, shearModulus: 8e10, density: 7850, outerDiameter: 0.1, [key]: 1 };
      const member = { ...cable(), tension: undefined, kind: 'shaft', segments: [segment] };
      delete (member as { tension?: unknown }).tension;
      const records = faultsOf('modes', modes({ member }));
      expect(records.map(({ pointer }) => pointer)).toEqual([`/member/segments/0/${key}`]);
      const said = records[0].detail.replace(`"${key}"`, '');
      expect(said).not.toMatch(/axial|young|tension|massPerLength/i);
    }
  });

  it('lists fifty faults and counts the others', () => {
    const segments = Array.from({ length: 300 }, () => ({ length: -1, massPerLength: 1 }));
    const records = faultsOf('modes', modes({ member: cable({ segments }) }));
    expect(records).toHaveLength(51);
    expect(records[50].code).toBe('more-faults');
    expect(records[50].detail).toMatch(/^250 more faults/);
  });
});
