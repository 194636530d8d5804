import { fault } from '../faults/fault.ts';
import { shownText } from './answer-query.ts';

const bare = /^[\x21-\x7e]{1,255}$/;
const quoted = /^"((?:[\x20-\x21\x23-\x5b\x5d-\x7e]|\\["\\]){1,255})"$/;

/**
 * The `Idempotency-Key` of a request (draft-ietf-httpapi-idempotency-key-header), in quotes or, as many
 * clients send it, bare; null where there is none.
 *
 * @throws Fault `idempotency-key-malformed`
 */
export function idempotencyKey(header: string | string[] | undefined): string | null {
  if (header === undefined) return null;
  const text = String(header).trim();
  const inQuotes = quoted.exec(text);
  if (inQuotes !== null) return inQuotes[1].replace(/\\(.)/g, '$1');
  if (bare.test(text) && !text.includes('"')) return text;
  throw fault('idempotency-key-malformed', '', { found: shownText(text) });
}
