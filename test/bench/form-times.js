import { performance } from 'node:perf_hooks';
import { encodeAnswer } from '../../dist/pool/encode-answer.js';
import { operations } from '../../dist/pool/operations.js';
import { modesRequest, responsesRequest } from './reference-member.js';
import { fixed, median, printTable } from './timing.js';

const rounds = 15;
const json = { format: 'json' };

/** Time and size of every form and content coding of an answer, against its JSON. */
export function formTimes() {
  const rows = [];
  for (const [operation, table, request] of [
    ['responses', 'fields', responsesRequest(64, 200, 250)],
    ['modes', 'modes', modesRequest(256)],
  ]) {
    const { read, solve } = operations[operation];
    const canonical = read(request);
    const answer = solve(canonical);
    const wanted = [
      { form: json, codings: ['identity'] },
      { form: json, codings: ['gzip'] },
      { form: json, codings: ['br'] },
      { form: { format: 'csv', table }, codings: ['identity'] },
      { form: { format: 'csv', table }, codings: ['br'] },
      { form: { format: 'arrow', table }, codings: ['identity'] },
      { form: { format: 'arrow', table }, codings: ['br'] },
    ];
    const results = wanted.map(() => ({ times: [], size: 0 }));
    for (let round = 0; round < rounds; round++) {
      for (const [i, one] of wanted.entries()) {
        const started = performance.now();
        const { bytes } = encodeAnswer(operation, canonical, answer, one);
        results[i].times.push(performance.now() - started);
        results[i].size = bytes.byteLength;
      }
    }
    const reference = median(results[0].times);
    for (const [i, { form, codings }] of wanted.entries()) {
      const time = median(results[i].times);
      rows.push([
        operation,
        form.format,
        codings[0],
        fixed(time, 2),
        fixed(time / reference),
        fixed(results[i].size / 1024, 0),
        fixed(results[i].size / results[0].size),
      ]);
    }
  }
  printTable('Forms of an answer', ['answer', 'form', 'coding', 'ms', '× JSON', 'kB', '× JSON'], rows);
}
