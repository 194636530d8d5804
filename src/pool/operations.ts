import { readRequest } from '../contract/read-request.ts';
import { solveChecks } from '../solutions/checks.ts';
import { solveModes } from '../solutions/modes.ts';
import { solveResponses } from '../solutions/responses.ts';
import { solveTransferFunctions } from '../solutions/transfer-functions.ts';
import type {
  ChecksAnswer,
  ChecksRequest,
  ModesRequest,
  ResponsesRequest,
  TransferFunctionsRequest,
} from '../spec/types.ts';
import type { SolverOperations } from './task.ts';

/** Every operation that a worker solves: how its body is read, how its request is solved. */
export const operations: SolverOperations = {
  modes: {
    read: (body) => readRequest('modes', body),
    solve: (request) => solveModes(request as ModesRequest),
  },
  responses: {
    read: (body) => readRequest('responses', body),
    solve: (request) => solveResponses(request as ResponsesRequest),
  },
  'transfer-functions': {
    read: (body) => readRequest('transfer-functions', body),
    solve: (request) => solveTransferFunctions(request as TransferFunctionsRequest),
  },
  checks: {
    read: (body) => readRequest('checks', body),
    solve: (request) => solveChecks(request as ChecksRequest),
    verdictOf: (answer) => (answer as ChecksAnswer).verdict,
  },
};
