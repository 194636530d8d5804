import { performance } from 'node:perf_hooks';

/** The first modes of the member of a request, and the responses it asks for. */
export async function solveExample(url, request) {
  const modes = await post(`${url}/v1/modes`, { member: request.member, series: { modes: 5 } });
  const started = performance.now();
  const responses = await post(`${url}/v1/responses`, request);
  return { request, modes, responses, milliseconds: performance.now() - started };
}

async function post(url, body) {
  const response = await fetch(url, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(body),
  });
  const answer = await response.json();
  if (!response.ok) throw new Error(`${url} answered ${response.status}: ${JSON.stringify(answer, null, 2)}`);
  return answer;
}
