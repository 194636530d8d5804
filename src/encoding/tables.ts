import type {
  Member,
  ModesAnswer,
  ModesRequest,
  ResponsesAnswer,
  TransferFunctionsAnswer,
} from '../spec/types.ts';
import { coefficientTable, fieldTable } from './motion-tables.ts';
import { modeTable, shapeTable } from './mode-tables.ts';
import type { Table } from './table.ts';
import { transferTable } from './transfer-table.ts';

/** Every table that some answer has. */
export const tableNames = ['fields', 'modes', 'coefficients', 'transfer'] as const;
export type TableName = (typeof tableNames)[number];

/** Operations whose answers have tables. */
export type TabulatedOperation = 'modes' | 'responses' | 'transfer-functions';

/** The tables of every operation, the default first. */
export const tablesOf: Readonly<Record<TabulatedOperation, readonly TableName[]>> = {
  modes: ['modes', 'fields'],
  responses: ['fields', 'coefficients'],
  'transfer-functions': ['transfer'],
};

/**
 * One table of an answer.
 *
 * @param request the canonical request, which tells the units
 * @param answer as a reader of its JSON has it
 * @param name one of the tables of the operation
 * @throws Fault `nothing-to-tabulate` where the request did not ask for what the table holds
 */
export function tableOf(
  operation: TabulatedOperation,
  request: unknown,
  answer: unknown,
  name: TableName,
): Table {
  const { member } = request as { member: Member };
  switch (operation) {
    case 'modes':
      return name === 'modes'
        ? modeTable(request as ModesRequest, answer as ModesAnswer)
        : shapeTable(request as ModesRequest, answer as ModesAnswer);
    case 'responses':
      return name === 'coefficients'
        ? coefficientTable(member.kind, answer as ResponsesAnswer)
        : fieldTable(answer as ResponsesAnswer);
    case 'transfer-functions':
      return transferTable(answer as TransferFunctionsAnswer);
  }
}
