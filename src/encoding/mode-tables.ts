import { fault } from '../faults/fault.ts';
import type { Mode, ModesAnswer, ModesRequest, ShapeQuantity } from '../spec/types.ts';
import { column, type Column, type Table } from './table.ts';

/** One row per mode: frequencies, and participation and energy shares where they were asked for. */
export function modeTable(request: ModesRequest, { modes, participation }: ModesAnswer): Table {
  const { kind } = request.member;
  const mass = kind === 'shaft' ? 'kg.m2' : 'kg';
  const byPeak = request.shapes?.normalisation === 'peak';
  const of = (name: string, unit: string | null, value: (mode: Mode) => number | null): Column =>
    column(name, unit, modes.map(value));
  const count = (name: string, value: (mode: Mode) => number): Column =>
    column(name, null, modes.map(value), 'integer');
  const columns = [
    count('order', (mode) => mode.order),
    of('angularFrequency', 'rad/s', (mode) => mode.angularFrequency),
    of('frequency', 'Hz', (mode) => mode.frequency),
    of('period', 's', (mode) => mode.period),
    of('enclosureLower', 'rad/s', (mode) => mode.enclosure[0]),
    of('enclosureUpper', 'rad/s', (mode) => mode.enclosure[1]),
    of('dampingRatio', '1', (mode) => mode.dampingRatio),
    // A shape that is normalised by mass carries the root of the mass itself.
    of('modalMass', byPeak ? mass : '1', (mode) => mode.modalMass),
    count('nodalPoints', (mode) => mode.nodalPoints),
  ];
  if (participation !== undefined) {
    columns.push(
      of('participationFactor', rootMass(kind), (mode) => mode.participation?.factor ?? null),
      of('effectiveMass', mass, (mode) => mode.participation?.effectiveMass ?? null),
      of('effectiveMassFraction', '1', (mode) => mode.participation?.effectiveMassFraction ?? null),
      of('cumulativeFraction', '1', (mode) => mode.participation?.cumulativeFraction ?? null),
    );
  }
  const shares = modes.find((mode) => mode.energyShares != null)?.energyShares;
  if (shares != null) {
    const parts = [
      ...Array.from(shares.segments, (_, i) => [`segmentEnergyShare${i + 1}`, 'segments', i] as const),
      ...Array.from(
        shares.attachments,
        (_, i) => [`attachmentEnergyShare${i + 1}`, 'attachments', i] as const,
      ),
      ['nearEndEnergyShare', 'ends', 0] as const,
      ['farEndEnergyShare', 'ends', 1] as const,
    ];
    for (const [name, part, i] of parts)
      columns.push(of(name, '1', (mode) => mode.energyShares?.[part][i] ?? null));
  }
  return { rows: modes.length, columns };
}

/** One row per mode and position, in this order: the shapes. */
export function shapeTable(request: ModesRequest, { modes, shapes }: ModesAnswer): Table {
  if (shapes === undefined || request.shapes === undefined) {
    const reason = 'the request did not ask for shapes';
    const remedy = 'Add "shapes": {"positions": {"count": 101}} to the request, or ask for table=modes.';
    throw fault('nothing-to-tabulate', '', { table: 'fields', reason, remedy });
  }
  const { kind } = request.member;
  const { normalisation, quantities } = request.shapes;
  const stations = shapes.positions.length;
  const sampled = quantities.map((quantity) => {
    const values = new Float64Array(modes.length * stations);
    modes.forEach(({ shape }, i) => values.set(shape![quantity]!, i * stations));
    return column(quantity, shapeUnit(quantity, kind, normalisation), values);
  });
  const orders = modes.map(({ order }) => order);
  return {
    rows: modes.length * stations,
    columns: [
      { ...column('order', null, orders, 'integer'), each: stations },
      column('position', 'm', shapes.positions),
      ...sampled,
    ],
  };
}

/** A root of a mass has no UCUM code. */
function rootMass(kind: string): string {
  return kind === 'shaft' ? '√(kg·m²)' : '√kg';
}

function shapeUnit(quantity: ShapeQuantity, kind: string, normalisation: 'mass' | 'peak'): string {
  const shaft = kind === 'shaft';
  if (quantity === 'displacement') return normalisation === 'peak' ? '1' : `1/${rootMass(kind)}`;
  if (normalisation === 'peak') return shaft ? 'N.m' : 'N/m';
  return shaft ? 'N·m/√(kg·m²)' : 'N/(m·√kg)';
}
