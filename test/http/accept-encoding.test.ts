import { describe, expect, it } from 'vitest';
import { acceptedCodings } from '../../src/http/accept-encoding.ts';

const offered = ['br', 'gzip', 'identity'] as const;

// RFC 9110, section 12.5.3; the first rows are its own examples.
describe('Accept-Encoding', () => {
  it.each([
    ['compress, gzip', ['gzip', 'identity']],
    ['', ['identity']],
    ['*', ['br', 'gzip', 'identity']],
    ['compress;q=0.5, gzip;q=1.0', ['gzip', 'identity']],
    ['gzip;q=1.0, identity; q=0.5, *;q=0', ['gzip', 'identity']],
    ['gzip, deflate, br', ['br', 'gzip', 'identity']],
    ['br;q=0.5, gzip', ['gzip', 'br', 'identity']],
    ['GZIP', ['gzip', 'identity']],
    ['x-gzip', ['gzip', 'identity']],
    ['identity', ['identity']],
    ['identity, gzip;q=0.5', ['identity', 'gzip']],
    ['gzip;q=0', ['identity']],
    ['identity;q=0', []],
    ['*;q=0', []],
    ['identity;q=0, gzip', ['gzip']],
    ['deflate, *;q=0.1', ['br', 'gzip', 'identity']],
  ])('%j takes %j', (header, codings) => {
    expect(acceptedCodings(header, offered)).toEqual(codings);
  });

  it('that is missing takes only what is not coded', () => {
    expect(acceptedCodings(undefined, offered)).toEqual(['identity']);
  });
});
