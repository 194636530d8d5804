import { tableFromIPC } from '@uwdata/flechette';
import { parse } from 'csv-parse/sync';
import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ModesAnswer, ResponsesAnswer, TransferFunctionsAnswer } from '../../src/spec/types.ts';
import { startServiceProcess, type ServiceProcess } from './service-process.ts';

const examples = new URL('../../schemas/examples/', import.meta.url);
const example = (name: string): Record<string, unknown> =>
  JSON.parse(readFileSync(new URL(name, examples), 'utf8')) as Record<string, unknown>;
const pile = {
  ...example('struck-pile.json'),
  sample: {
    positions: { count: 5 },
    times: { end: 0.01, count: 7 },
    quantities: ['displacement', 'velocity', 'force'],
    gaugeTime: 0.0005,
  },
};
const soil = {
  ...example('layered-soil-modes.json'),
  series: { modes: 12 },
  shapes: { positions: { count: 9 }, quantities: ['displacement', 'force'] },
  energyShares: true,
};
const transfer = example('soil-column-transfer.json');

let service: ServiceProcess;
beforeAll(async () => {
  // Nothing is kept of the answers: each one is solved again, by either worker.
  service = await startServiceProcess({ ANSWERS_MEMORY: '0' });
});
afterAll(async () => {
  await service.stop();
});

async function linkTo(path: string, request: object): Promise<{ link: string; json: unknown }> {
  const solved = await service.post(path, request);
  expect(solved.status).toBe(200);
  return { link: service.url + solved.headers.get('content-location'), json: await solved.json() };
}

type Cell = number | string | null;

interface Read {
  readonly columns: Record<string, Cell[]>;
  readonly units: Record<string, string | undefined>;
}

/** A table through both general readers, which must agree. */
async function readTable(link: string, table: string): Promise<Read> {
  const csv = await fetch(`${link}?format=csv&table=${table}`);
  expect(csv.headers.get('content-type')).toBe('text/csv; charset=utf-8; header=present');
  const text = await csv.text();
  expect(text.endsWith('\r\n') && !/[^\r]\n/.test(text)).toBe(true);
  const [header, ...rows] = parse(text);
  const arrow = await fetch(`${link}?table=${table}`, {
    headers: { accept: 'application/vnd.apache.arrow.stream' },
  });
  expect(arrow.headers.get('content-type')).toBe('application/vnd.apache.arrow.stream');
  const read = tableFromIPC(await arrow.arrayBuffer());
  expect(read.schema.metadata?.get('table')).toBe(table);
  const columns: Record<string, Cell[]> = {};
  const units: Record<string, string | undefined> = {};
  for (const [i, { name, metadata }] of read.schema.fields.entries()) {
    units[name] = metadata?.get('unit');
    expect(header[i]).toBe(units[name] === undefined ? name : `${name} [${units[name]}]`);
    columns[name] = Array.from({ length: read.numRows }, (_, row) => read.getChild(name).at(row) as Cell);
    const texts = columns[name].map((value) => (value === null ? '' : String(value)));
    expect(rows.map((row) => row[i])).toEqual(texts);
  }
  expect(rows).toHaveLength(read.numRows);
  return { columns, units };
}

describe('tables of an answer', () => {
  it('hold the fields of a motion as the JSON has them, with units and bounds', async () => {
    const { link, json } = await linkTo('/v1/responses', pile);
    const { fields } = json as ResponsesAnswer;
    const { columns, units } = await readTable(link, 'fields');
    const stations = fields.positions.length;
    expect(columns.time).toEqual([...fields.times].flatMap((time) => Array<number>(stations).fill(time)));
    expect(columns.position).toEqual([...fields.times].flatMap(() => [...fields.positions]));
    for (const quantity of ['displacement', 'velocity', 'force'] as const) {
      const field = fields[quantity]!;
      expect(columns[quantity]).toStrictEqual(field.values.flatMap((row) => [...row]));
      expect(units[quantity]).toBe(field.unit);
      const name = quantity + (field.boundKind === 'pointwise' ? 'Bound' : 'GaugeAverageBound');
      expect(columns[name]).toStrictEqual([...fields.times].flatMap(() => [...field.bound!]));
      expect(units[name]).toBe(field.unit);
    }
    expect(units).toMatchObject({ time: 's', position: 'm', displacement: 'm', velocity: 'm/s', force: 'N' });
    expect(Object.keys(columns)).toHaveLength(8);
  });

  it('hold the coefficients of a motion', async () => {
    const { link, json } = await linkTo('/v1/responses', pile);
    const { coefficients } = json as ResponsesAnswer;
    const { columns, units } = await readTable(link, 'coefficients');
    for (const key of ['order', 'angularFrequency', 'cosine', 'sine', 'energy'] as const) {
      expect(columns[key]).toStrictEqual(coefficients.map((coefficient) => coefficient[key]));
    }
    expect(units).toEqual({
      order: undefined,
      angularFrequency: 'rad/s',
      cosine: 'm·√kg',
      sine: 'm·√kg',
      energy: 'J',
    });
  });

  it('hold modes with participation and energy shares, and their shapes', async () => {
    const { link, json } = await linkTo('/v1/modes', soil);
    const { modes, shapes } = json as ModesAnswer;
    const { columns, units } = await readTable(link, 'modes');
    expect(columns.frequency).toStrictEqual(modes.map(({ frequency }) => frequency));
    expect(columns.enclosureUpper).toStrictEqual(modes.map(({ enclosure }) => enclosure[1]));
    expect(columns.effectiveMass).toStrictEqual(
      modes.map(({ participation }) => participation!.effectiveMass),
    );
    expect(columns.segmentEnergyShare1).toStrictEqual(
      modes.map(({ energyShares }) => energyShares!.segments[0]),
    );
    expect(units).toMatchObject({ frequency: 'Hz', dampingRatio: '1', effectiveMass: 'kg', modalMass: '1' });
    const sampled = await readTable(link, 'fields');
    expect(sampled.columns.force).toStrictEqual(modes.flatMap(({ shape }) => [...shape!.force!]));
    expect(sampled.columns.position).toEqual(modes.flatMap(() => [...shapes!.positions]));
    expect(sampled.columns.order).toEqual(modes.flatMap(({ order }) => Array<number>(9).fill(order)));
    expect(sampled.units).toMatchObject({ displacement: '1/√kg', force: 'N/(m·√kg)' });
  });

  it('have an empty cell where the JSON has null: the period of a rigid-body mode', async () => {
    const free = {
      member: {
        kind: 'bar',
        segments: [{ length: 2, axialStiffness: 1e8, massPerLength: 10 }],
        ends: { near: { type: 'free' }, far: { type: 'free' } },
      },
      series: { modes: 3 },
      energyShares: true,
    };
    const { link } = await linkTo('/v1/modes', free);
    const { columns } = await readTable(link, 'modes');
    expect([columns.period[0], columns.segmentEnergyShare1[0]]).toEqual([null, null]);
    expect(columns.period[1]).toBeGreaterThan(0);
  });

  it('hold transfer functions, one row per output and frequency', async () => {
    const { link, json } = await linkTo('/v1/transfer-functions', transfer);
    const { frequencies, outputs } = json as TransferFunctionsAnswer;
    const { columns, units } = await readTable(link, 'transfer');
    expect(columns.magnitude).toStrictEqual(outputs.flatMap(({ magnitude }) => [...magnitude]));
    expect(columns.phase).toStrictEqual(outputs.flatMap(({ phase }) => [...phase]));
    expect(columns.frequency).toEqual(outputs.flatMap(() => [...frequencies]));
    expect(columns.unit).toEqual(outputs.flatMap(({ unit }) => Array.from(frequencies, () => unit)));
    expect(units).toMatchObject({ at: 'm', frequency: 'Hz', phase: 'rad' });
  });

  it('come at once from a solve, with a good table where none is named', async () => {
    const solved = await service.post('/v1/transfer-functions?format=csv', transfer);
    expect((await solved.text()).split('\r\n')[0]).toMatch(
      /^output,at \[m\],quantity,unit,frequency \[Hz\],/,
    );
    const link = service.url + solved.headers.get('content-location');
    expect((await fetch(`${link}?format=csv&table=transfer`)).headers.get('etag')).toBe(
      solved.headers.get('etag'),
    );
  });
});

describe('forms of an answer', () => {
  it('each have a tag of their own, and the same one by Accept as by the query', async () => {
    const { link } = await linkTo('/v1/responses', pile);
    const queries = [
      '',
      '?format=csv',
      '?format=csv&table=coefficients',
      '?format=arrow',
      '?format=svg',
      '?format=svg&width=800',
      '?format=svg&theme=dark',
      '?format=svg&stations=1',
      '?format=svg&view=envelope',
      '?format=png',
    ];
    const tags = await Promise.all(
      queries.map(async (query) => (await fetch(link + query)).headers.get('etag')),
    );
    expect(new Set(tags).size).toBe(queries.length);
    const byAccept = await fetch(link, { headers: { accept: 'text/csv;q=0.9, application/json;q=0.2' } });
    expect(byAccept.headers.get('etag')).toBe(tags[1]);
    const image = await fetch(`${link}?view=envelope`, {
      headers: { accept: 'image/avif,image/webp,image/svg+xml,image/*;q=0.8,*/*;q=0.5' },
    });
    expect([image.headers.get('content-type'), image.headers.get('etag')]).toEqual([
      'image/svg+xml',
      tags[8],
    ]);
    expect(image.headers.get('content-security-policy')).toMatch(/default-src 'none'.*img-src data:/);
    const png = await fetch(`${link}?format=png`);
    expect(png.headers.get('content-type')).toBe('image/png');
    expect(
      Buffer.from(await png.arrayBuffer())
        .subarray(1, 4)
        .toString(),
    ).toBe('PNG');
    const json = await fetch(link, { headers: { accept: 'text/html,application/xml;q=0.9,*/*;q=0.8' } });
    expect(json.headers.get('etag')).toBe(tags[0]);
  });

  it.each([
    ['?format=yaml', 400, 'parameter-value', /"yaml".*json, csv, arrow, svg, png/],
    ['?table=modes&format=csv', 400, 'parameter-value', /"modes".*responses has: fields, coefficients/],
    ['?format=svg&view=transfer', 400, 'parameter-value', /"transfer".*responses has: history/],
    [
      '?format=json&view=history',
      400,
      'parameter-without-use',
      /view has no meaning for the format json.*svg, png/,
    ],
    ['?format=png&table=fields', 400, 'parameter-without-use', /table .*csv, arrow/],
    ['?table=fields&view=history', 400, 'parameter-without-use', /view/],
    ['?pretty=1', 400, 'unknown-parameter', /"pretty"/],
  ])('are refused where they make no sense: %s', async (query, status, code, wording) => {
    const { link } = await linkTo('/v1/responses', pile);
    for (const answer of [await fetch(link + query), await service.post(`/v1/responses${query}`, pile)]) {
      const problem = (await answer.json()) as { code: string; detail: string };
      expect([answer.status, problem.code]).toEqual([status, code]);
      expect(problem.detail).toMatch(wording);
    }
  });

  it('are refused with 406 where Accept admits none to which the query applies', async () => {
    const { link } = await linkTo('/v1/responses', pile);
    const answer = await fetch(`${link}?view=history`, { headers: { accept: 'application/json' } });
    expect(answer.status).toBe(406);
    expect(answer.headers.get('vary')).toBe('Accept, Accept-Encoding');
    expect(((await answer.json()) as { detail: string }).detail).toMatch(
      /offered: image\/svg\+xml, image\/png/,
    );
  });

  it('are refused with 422 where the request did not ask for what they show', async () => {
    const { shapes: _shapes, ...bare } = soil;
    const { link } = await linkTo('/v1/modes', bare);
    const answer = await fetch(`${link}?format=csv&table=fields`);
    expect([answer.status, ((await answer.json()) as { code: string }).code]).toEqual([
      422,
      'nothing-to-tabulate',
    ]);
  });

  it('have the same bytes from every worker, from kept JSON, and after a restart', async () => {
    const keeping = await startServiceProcess({ WORKERS: '1' });
    try {
      const links: string[] = [];
      for (const { url, post } of [service, keeping]) {
        const solved = await post('/v1/responses', pile);
        links.push(url + solved.headers.get('content-location'));
        await solved.arrayBuffer();
      }
      expect(links[0].replace(service.url, '')).toBe(links[1].replace(keeping.url, ''));
      const queries = [
        '',
        '?format=csv',
        '?format=csv&table=coefficients',
        '?format=arrow',
        '?format=svg',
        '?format=png',
      ];
      for (const query of queries) {
        const several = [links[0], links[0], links[1], links[1]];
        const bodies = await Promise.all(
          several.map(async (link) =>
            Buffer.from(await (await fetch(link + query)).arrayBuffer()).toString('base64'),
          ),
        );
        expect(new Set(bodies).size).toBe(1);
      }
    } finally {
      await keeping.stop();
    }
  });
});
