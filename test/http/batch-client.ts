import { once } from 'node:events';
import { request as httpRequest, type ClientRequest, type IncomingMessage } from 'node:http';

/** One line of the answer to a batch. */
export interface AnswerLine {
  readonly id: string | null;
  readonly status: number;
  readonly answer?: Record<string, unknown>;
  readonly problem?: {
    readonly code: string;
    readonly detail: string;
    readonly line: number;
    readonly errors: readonly { readonly pointer: string; readonly code: string }[];
  };
}

export function linesOf(text: string): AnswerLine[] {
  if (!text.endsWith('\n')) throw new Error('the last line has no end');
  return text
    .slice(0, -1)
    .split('\n')
    .map((line) => JSON.parse(line) as AnswerLine);
}

/** Lines of a batch as text. */
export function batchOf(lines: readonly unknown[]): string {
  return lines.map((line) => (typeof line === 'string' ? line : JSON.stringify(line))).join('\n');
}

/** Sends a whole batch and reads its whole answer. */
export async function postBatch(
  url: string,
  lines: readonly unknown[] | string,
  headers: Record<string, string> = {},
): Promise<Response> {
  return fetch(`${url}/v1/batches`, {
    method: 'POST',
    headers: { 'content-type': 'application/x-ndjson', ...headers },
    body: typeof lines === 'string' ? lines : batchOf(lines),
  });
}

/** A batch that is sent and read piece by piece, as its test wants. */
export class OpenBatch {
  readonly request: ClientRequest;
  #response: IncomingMessage | undefined;
  #chunks: AsyncIterator<Buffer> | undefined;
  #text = '';

  constructor(url: string, headers: Record<string, string> = {}) {
    this.request = httpRequest(`${url}/v1/batches`, {
      method: 'POST',
      headers: { 'content-type': 'application/x-ndjson', ...headers },
    });
    this.request.on('error', () => undefined);
    this.request.on('response', (response: IncomingMessage) => (this.#response = response));
    this.request.flushHeaders();
  }

  /** Sends text; resolves once there is room for more. */
  async send(text: string): Promise<void> {
    if (!this.request.write(text)) await once(this.request, 'drain');
  }

  /** The next line of the answer, null at its end. */
  async next(): Promise<AnswerLine | null> {
    this.#response ??= ((await once(this.request, 'response')) as [IncomingMessage])[0];
    this.#chunks ??= this.#response[Symbol.asyncIterator]();
    let end: number;
    while ((end = this.#text.indexOf('\n')) < 0) {
      const { done, value } = await this.#chunks.next();
      if (done) return null;
      this.#text += value.toString();
    }
    const line = JSON.parse(this.#text.slice(0, end)) as AnswerLine;
    this.#text = this.#text.slice(end + 1);
    return line;
  }
}
