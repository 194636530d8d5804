import type { ErrorObject } from 'ajv/dist/2020.js';
import { Fault, faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { Member, ModesRequest, ResponsesRequest, TransferFunctionsRequest } from '../spec/types.ts';
import { checkModesRequest, checkResponsesRequest, checkTransferFunctionsRequest } from './check-sense.ts';
import { copyDocument } from './copy-document.ts';
import { isHistoryKnown } from './dimension-at.ts';
import { formsWithin } from './forms.ts';
import { nameFault, type NamingContext } from './name-fault.ts';
import { isWithin } from './pointer.ts';
import { validatorOf } from './validators.ts';

/** The operations that take a request. */
export type Operation = 'modes' | 'responses' | 'transfer-functions';

/** The canonical request of any operation. */
export type AnyRequest = ModesRequest | ResponsesRequest | TransferFunctionsRequest;

/** Most faults that are listed at once. */
export const mostFaults = 50;

const readers = {
  modes: readerOf<ModesRequest>('ModesRequest', checkModesRequest),
  responses: readerOf<ResponsesRequest>('ResponsesRequest', checkResponsesRequest),
  'transfer-functions': readerOf<TransferFunctionsRequest>(
    'TransferFunctionsRequest',
    checkTransferFunctionsRequest,
  ),
};

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
        ((kindKnown || isWithin(pointer, '/member')) && isHistoryKnown(context.document, pointer)),
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
