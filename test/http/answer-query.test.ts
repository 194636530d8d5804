import { describe, expect, it } from 'vitest';
import type { Fault } from '../../src/faults/fault.ts';
import { readAnswerQuery } from '../../src/http/answer-query.ts';

function faultsOf(query: Record<string, string | string[]>): string[] {
  try {
    readAnswerQuery(query);
  } catch (error) {
    return (error as Fault).records.map(({ code, detail }) => `${code}: ${detail}`);
  }
  return [];
}

describe('the query of an answer', () => {
  it('is read with its numbers and lists', () => {
    expect(
      readAnswerQuery({
        format: 'svg',
        view: 'history',
        width: '800',
        height: '3000',
        theme: 'dark',
        stations: '0,12.5,1e1',
        instants: '-0',
        modes: '1,20000',
      }),
    ).toStrictEqual({
      format: 'svg',
      view: 'history',
      width: 800,
      height: 3000,
      theme: 'dark',
      stations: [0, 12.5, 10],
      instants: [0],
      modes: [1, 20000],
    });
    expect(readAnswerQuery({})).toEqual({});
  });

  it.each([
    [{ format: 'yaml' }, /format is "yaml", but must be one of: json, csv, arrow, svg, png/],
    [{ format: '' }, /format is ""/],
    [{ format: 'CSV' }, /format is "CSV"/],
    [{ table: 'all' }, /table is "all", but must be one of: fields, modes, coefficients, transfer/],
    [{ view: 'pie' }, /view is "pie", but must be one of: shapes, frequencies, history/],
    [{ width: '319' }, /width is "319", but must be a whole number from 320 to 4096 px/],
    [{ width: '4097' }, /320 to 4096/],
    [{ width: '800.5' }, /whole number/],
    [{ width: '8e2x' }, /whole number/],
    [{ height: '239' }, /from 240 to 4096 px/],
    [{ theme: 'blue' }, /light, dark/],
    [{ stations: '1,,2' }, /stations is "1,,2", but must be 1 to 24 positions in m with commas/],
    [{ stations: Array.from({ length: 25 }, (_, i) => i).join(',') }, /1 to 24 positions/],
    [{ stations: '1 m' }, /positions in m/],
    [{ instants: '1e999' }, /times in s/],
    [{ modes: '0' }, /orders of modes/],
    [{ modes: '1.5' }, /orders of modes/],
  ])('refuses %j', (query, wording) => {
    const faults = faultsOf(query);
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatch(/^parameter-value: /);
    expect(faults[0]).toMatch(wording);
  });

  it('names every fault at once', () => {
    const faults = faultsOf({ colour: 'red', format: ['csv', 'json'], width: '1', __proto: 'x' });
    expect(faults.map((text) => text.split(':')[0])).toEqual([
      'unknown-parameter',
      'repeated-parameter',
      'parameter-value',
      'unknown-parameter',
    ]);
    expect(faults[0]).toMatch(
      /"colour".*format, table, view, width, height, theme, stations, instants, modes/,
    );
    expect(faults[1]).toMatch(/format stands 2 times/);
  });
});
