import type { ErrorObject } from 'ajv/dist/2020.js';
import { Fault, faultRecord, type FaultRecord } from '../faults/fault.ts';
import type {
  ChecksRequest,
  Member,
  ModesRequest,
  ResponsesRequest,
  TransferFunctionsRequest,
} from '../spec/types.ts';
import { checkCriteria } from './check-criteria.ts';
import { checkModesRequest, checkResponsesRequest, checkTransferFunctionsRequest } from './check-sense.ts';
import { copyDocument } from './copy-document.ts';
import { isDimensionKnown } from './dimension-at.ts';
import { formsWithin } from './forms.ts';
import { nameFault, type NamingContext } from './name-fault.ts';
import { isWithin } from './pointer.ts';
import { validatorOf } from './validators.ts';

/** The operations that solve one member. */
export type MemberOperation = 'modes' | 'responses' | 'transfer-functions';

/** The operations that take a request. */
export type Operation = MemberOperation | 'checks';

/** The canonical request of any operation. */
export type AnyRequest = ModesRequest | ResponsesRequest | TransferFunctionsRequest | ChecksRequest;

/** Most faults that are listed at once. */
export const mostFaults = 50;

const memberReaders = {
  modes: readerOf<ModesRequest>('ModesRequest', checkModesRequest),
  responses: readerOf<ResponsesRequest>('ResponsesRequest', checkResponsesRequest),
  'transfer-functions': readerOf<TransferFunctionsRequest>(
    'TransferFunctionsRequest',
    checkTransferFunctionsRequest,
  ),
};

const readers = { ...memberReaders, checks: checksReader() };

/**
 * The canonical request that a parsed body means: validated, in SI, defaults filled in, positions
 * near a node set to the node.
 *
 * @param operation what is asked for
 * @param body a parsed JSON document; it is not changed
 * @throws Fault with all faults of the request, at most 50 and one that counts the rest; faults of
 *   form come first
 * Cost: O(size of the body), below 1 ms for a request of a few segments.
 */
export function readRequest(operation: 'modes', body: unknown): ModesRequest;
export function readRequest(operation: 'responses', body: unknown): ResponsesRequest;
export function readRequest(operation: 'transfer-functions', body: unknown): TransferFunctionsRequest;
export function readRequest(operation: 'checks', body: unknown): ChecksRequest;
export function readRequest(operation: Operation, body: unknown): AnyRequest;
export function readRequest(operation: Operation, body: unknown): AnyRequest {
  return readers[operation](body);
}

function readerOf<Request>(
  title: string,
  check: (request: Request, formFaults: readonly FaultRecord[]) => FaultRecord[],
): (body: unknown) => Request {
  const validate = validatorOf(title);
  const forms = formsWithin(title);
  return (body) => {
    const { copy, faults, fatal } = copyDocument(body);
    if (fatal) throw capped(faults);
    const kind = kindOf(copy);
    const context: NamingContext = { kind: kind ?? 'cable', document: copy, originals: new Map(), forms };
    const form = validate.call(context, copy)
      ? faults
      : firstAtEachPlace([...faults, ...named(validate.errors ?? [], context, kind !== null)]);
    const all = [...form, ...check(copy as Request, form)];
    if (all.length > 0) throw capped(all);
    return copy as Request;
  };
}

/**
 * Reads a request of checks: first the request within, as its own operation reads it, then what is
 * around it. Faults of the request within are told once, with pointers into the whole.
 */
function checksReader(): (body: unknown) => ChecksRequest {
  const validate = validatorOf('ChecksRequest');
  const forms = formsWithin('ChecksRequest');
  return (body) => {
    const { copy, faults, fatal } = copyDocument(body);
    if (fatal) throw capped(faults);
    const inner = readWithin(copy);
    const kind = kindOf((copy as { request?: unknown } | null)?.request);
    const context: NamingContext = { kind: kind ?? 'cable', document: copy, originals: new Map(), forms };
    const around = validate.call(context, copy) ? [] : named(validate.errors ?? [], context, kind !== null);
    const form = firstAtEachPlace([
      ...faults.filter(({ pointer }) => inner === null || !isWithin(pointer, '/request')),
      ...(inner ?? []),
      ...around.filter(({ pointer }) => inner === null || !isWithin(pointer, '/request')),
    ]);
    const all = [...form, ...checkCriteria(copy as ChecksRequest, form)];
    if (all.length > 0) throw capped(all);
    return copy as ChecksRequest;
  };
}

/**
 * Puts the canonical request in the place of the request within.
 *
 * @returns the faults of that request; null where it is not known what it is a request of
 */
function readWithin(copy: unknown): FaultRecord[] | null {
  const { operation, request } = (copy ?? {}) as { operation?: unknown; request?: unknown };
  if (typeof operation !== 'string' || !Object.hasOwn(memberReaders, operation)) return null;
  if (request === undefined) return null;
  try {
    (copy as { request: unknown }).request = memberReaders[operation as MemberOperation](request);
    return [];
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    return error.records.map((record) => ({ ...record, pointer: `/request${record.pointer}` }));
  }
}

const kinds: readonly string[] = ['cable', 'bar', 'shaft', 'shear-column', 'wave'];

/** Kind of the member, null where the document does not say one. */
function kindOf(document: unknown): Member['kind'] | null {
  const kind = (document as { member?: { kind?: unknown } } | null)?.member?.kind;
  return typeof kind === 'string' && kinds.includes(kind) ? (kind as Member['kind']) : null;
}

function named(errors: readonly ErrorObject[], context: NamingContext, kindKnown: boolean): FaultRecord[] {
  return errors
    .map((error) => nameFault(error, context))
    .filter((record) => record !== null)
    .filter(
      // Without a kind the dimensions outside the member are not known.
      ({ code, pointer }) =>
        code !== 'unit-dimension' ||
        ((kindKnown || isWithin(pointer, '/member')) && isDimensionKnown(context.document, pointer)),
    );
}

/** The first fault of every place: what else is wrong there follows from it. */
function firstAtEachPlace(records: readonly FaultRecord[]): FaultRecord[] {
  const taken = new Set<string>();
  return records.filter(({ pointer }) => !taken.has(pointer) && taken.add(pointer));
}

function capped(records: readonly FaultRecord[]): Fault {
  if (records.length <= mostFaults) return new Fault(records);
  const rest = faultRecord('more-faults', '', { count: records.length - mostFaults });
  return new Fault([...records.slice(0, mostFaults), rest]);
}
