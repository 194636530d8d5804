import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { memberLength } from '../members/node-layout.ts';
import type {
  ChecksRequest,
  Criterion,
  DampingCriterion,
  FrequencyBand,
  PeakCriterion,
  TransferCriterion,
} from '../spec/types.ts';
import { checkPosition, spanOf } from './check-position.ts';
import { checkSize } from './check-sample.ts';
import { snapAttachments, snapList } from './snap-positions.ts';
import { soundness } from './soundness.ts';

/** What the criteria of a type are held against, where not every operation will do. */
const operationOf: Readonly<Partial<Record<Criterion['type'], ChecksRequest['operation']>>> = {
  peak: 'responses',
  'effective-mass': 'modes',
  transfer: 'transfer-functions',
};

/** The values of every criterion that lie between two limits: key, first, last, unit. */
type Range = readonly [key: string, from: number | undefined, to: number | undefined, unit: string];

/**
 * Faults of criteria beyond the schema. Positions of a criterion near a node are set to the node, and
 * a single one becomes a list.
 *
 * @param request its request within is canonical where it has no fault; changed in place
 * @param formFaults what was found already
 */
export function checkCriteria(request: ChecksRequest, formFaults: readonly FaultRecord[]): FaultRecord[] {
  const isSound = soundness(formFaults);
  if (!isSound('') || !Array.isArray(request.criteria)) return [];
  const seen = new Map<string, number>();
  const repeated = ({ id }: Criterion, index: number, pointer: string): FaultRecord[] => {
    const other = seen.get(id);
    if (other === undefined) seen.set(id, index);
    return other === undefined ? [] : [faultRecord('criterion-repeated', `${pointer}/id`, { id, other })];
  };
  return request.criteria.flatMap((criterion, index) => {
    const pointer = `/criteria/${index}`;
    const faults = isSound(`${pointer}/id`) ? repeated(criterion, index, pointer) : [];
    if (!isSound(pointer)) return faults;
    for (const range of rangesOf(criterion)) faults.push(...checkRange(range, pointer));
    if (criterion.type === 'frequency-range' && criterion.min === undefined && criterion.max === undefined) {
      faults.push(faultRecord('criterion-without-limit', pointer));
    }
    const wanted = operationOf[criterion.type] ?? request.operation;
    if (wanted !== request.operation) {
      const values = { type: criterion.type, wanted, operation: request.operation };
      return [...faults, faultRecord('criterion-misplaced', `${pointer}/type`, values)];
    }
    return isSound('/request') ? [...faults, ...checkFit(request, criterion, pointer)] : faults;
  });
}

function rangesOf(criterion: Criterion): Range[] {
  const band = (key: string, [from, to]: FrequencyBand, unit: string): Range => [key, from, to, unit];
  switch (criterion.type) {
    case 'frequency-range':
      return [['max', criterion.min, criterion.max, 'Hz']];
    case 'separation':
      return criterion.bands.map((one, index) => band(`bands/${index}`, one, 'Hz'));
    case 'vortex':
      return [band('wind', criterion.wind, 'm/s')];
    case 'transfer':
      return [band('band', criterion.band, 'Hz')];
    default:
      return [];
  }
}

function checkRange([key, from, to, unit]: Range, pointer: string): FaultRecord[] {
  if (from === undefined || to === undefined || from <= to) return [];
  const name = key === 'max' ? 'The range' : `The range ${key.replace('/', ' ')}`;
  return [faultRecord('range-reversed', `${pointer}/${key}`, { key: name, from, to, unit })];
}

/** What in a criterion does not fit to a request without faults. */
function checkFit(request: ChecksRequest, criterion: Criterion, pointer: string): FaultRecord[] {
  const { member } = request.request;
  switch (criterion.type) {
    case 'peak':
      return request.operation === 'responses' ? checkPeak(request, criterion, pointer) : [];
    case 'damping':
      return checkDamping(request, criterion, pointer);
    case 'vortex':
      return member.kind === 'cable' || member.kind === 'wave'
        ? []
        : [faultRecord('vortex-on-kind', `${pointer}/type`, { kind: member.kind })];
    case 'effective-mass':
      return request.operation === 'modes' && request.request.participation === undefined
        ? [faultRecord('criterion-without-participation', `${pointer}/type`)]
        : [];
    case 'transfer':
      return request.operation === 'transfer-functions' ? checkTransfer(request, criterion, pointer) : [];
    default:
      return [];
  }
}

function checkPeak(
  { request }: Extract<ChecksRequest, { operation: 'responses' }>,
  criterion: PeakCriterion,
  pointer: string,
): FaultRecord[] {
  const { quantity, gaugeTime = 0 } = criterion;
  const { quantities, times } = request.sample;
  const faults: FaultRecord[] = [];
  if (!quantities.includes(quantity)) {
    const values = { sampled: quantities.join(', '), quantity };
    faults.push(faultRecord('criterion-not-sampled', `${pointer}/quantity`, values));
  }
  if (gaugeTime > 0 && (quantity === 'displacement' || quantity === 'relativeDisplacement')) {
    faults.push(faultRecord('gauge-without-use', `${pointer}/gaugeTime`, { quantity }));
  }
  if (criterion.at === undefined) return faults;
  const list = Array.isArray(criterion.at) ? criterion.at : null;
  const places = list ?? [criterion.at as number];
  snapList(places, snapAttachments(request.member));
  criterion.at = places;
  const span = spanOf(memberLength(request.member));
  places.forEach((at, index) => {
    faults.push(...checkPosition(at, `${pointer}/at${list === null ? '' : `/${index}`}`, span));
  });
  const count = Array.isArray(times) ? times.length : times.count;
  return [...faults, ...checkSize({ positions: places.length, times: count }, `${pointer}/at`)];
}

function checkDamping(
  { operation, request }: ChecksRequest,
  criterion: DampingCriterion,
  pointer: string,
): FaultRecord[] {
  if (request.member.damping?.type === 'loss-factor') {
    return [faultRecord('criterion-on-loss-factor', `${pointer}/type`)];
  }
  if (criterion.upTo !== undefined || operation === 'modes') return [];
  return [faultRecord('criterion-without-band', pointer, { operation })];
}

function checkTransfer(
  { request }: Extract<ChecksRequest, { operation: 'transfer-functions' }>,
  { output, band }: TransferCriterion,
  pointer: string,
): FaultRecord[] {
  const { outputs, input } = request;
  if (output !== undefined && output >= outputs.length) {
    const values = { output, count: outputs.length };
    return [faultRecord('criterion-output-missing', `${pointer}/output`, values)];
  }
  const meant = output === undefined ? outputs : [outputs[output]];
  const quantities = [...new Set(meant.map(({ quantity }) => quantity))];
  if (quantities.length > 1) {
    return [faultRecord('criterion-outputs-mixed', pointer, { quantities: quantities.join(', ') })];
  }
  const accelerated = input.type !== 'point-force' && input.quantity === 'acceleration';
  return accelerated && band[0] === 0 && quantities[0] !== 'acceleration'
    ? [faultRecord('acceleration-at-zero-frequency', `${pointer}/band/0`)]
    : [];
}
