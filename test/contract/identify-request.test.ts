import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { identifyRequest } from '../../src/contract/identify-request.ts';
import { readRequest } from '../../src/contract/read-request.ts';

const member = (length: unknown, order: 'a' | 'b') => {
  const segment = order === 'a' ? { length, massPerLength: 58 } : { massPerLength: '58 kg/m', length };
  return {
    kind: 'cable',
    tension: '2.4 MN',
    segments: [segment],
    ends: { near: { type: 'fixed' }, far: { type: 'fixed' } },
  };
};
const identify = (body: unknown, version = '1') =>
  identifyRequest('modes', readRequest('modes', body), version);

describe('the name of a result', () => {
  it('is the SHA-256 of the canonical text of operation, request and version, in base64url', () => {
    const { digest, request } = identifyRequest('modes', { b: 1e21, a: [-0, 'ü'] }, '0.1.0');
    expect(new TextDecoder().decode(request)).toBe('{"a":[0,"ü"],"b":1e+21}');
    const text = '{"operation":"modes","request":{"a":[0,"ü"],"b":1e+21},"version":"0.1.0"}';
    expect(digest).toBe(createHash('sha256').update(text, 'utf8').digest('base64url'));
    expect(digest).toMatch(/^[\w-]{43}$/);
  });

  it('is the same for the same request in other units, another order of keys, with or without defaults', () => {
    const plain = identify({ member: member(45, 'a'), series: { modes: 2 }, shapes: { positions: [1] } });
    const other = identify({
      shapes: { quantities: ['displacement'], normalisation: 'mass', positions: ['1 m'] },
      series: { modes: 2 },
      member: member('45 m', 'b'),
    });
    expect(other.digest).toBe(plain.digest);
    expect(other.request).toEqual(plain.request);
  });

  it('is another one for another request, operation or version', () => {
    const body = { member: member(45, 'a'), series: { modes: 2 } };
    const digests = [
      identify(body),
      identify({ ...body, series: { modes: 3 } }),
      identify(body, '2'),
      identifyRequest('responses', readRequest('modes', body), '1'),
    ].map(({ digest }) => digest);
    expect(new Set(digests).size).toBe(4);
  });
});
