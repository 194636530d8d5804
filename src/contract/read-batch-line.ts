import { Fault, fault } from '../faults/fault.ts';
import type { BatchLineRequest } from '../spec/types.ts';
import { nameFault, type NamingContext } from './name-fault.ts';
import { showValue } from './show-value.ts';
import { validatorOf } from './validators.ts';

const validate = validatorOf('BatchLineRequest');

/**
 * One line of a batch: its id, its operation and the request as it stands there, which the operation
 * reads.
 *
 * @param document a parsed JSON document; it is not changed
 * @param operations those that a line may name
 * @throws Fault with all faults of the line
 */
export function readBatchLine(document: unknown, operations: readonly string[]): BatchLineRequest {
  const context: NamingContext = { kind: 'cable', document, originals: new Map(), forms: new Map() };
  if (!validate.call(context, document)) {
    const records = (validate.errors ?? []).map((error) => nameFault(error, context));
    throw new Fault(records.filter((record) => record !== null));
  }
  const line = document as BatchLineRequest;
  if (operations.includes(line.operation)) return line;
  throw fault('not-one-of', '/operation', {
    key: 'operation',
    found: showValue(line.operation),
    allowed: operations.join(', '),
  });
}
