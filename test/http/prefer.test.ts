import { describe, expect, it } from 'vitest';
import { parsePrefer, preferredWait } from '../../src/http/prefer.ts';

describe('the Prefer header (RFC 7240)', () => {
  it.each([
    ['respond-async, wait=10', { 'respond-async': '', wait: '10' }],
    ['Respond-Async', { 'respond-async': '' }],
    ['wait = 10', { wait: '10' }],
    ['foo; some-parameter', { foo: '' }],
    ['foo="bar, baz"; x=1, wait="5"', { foo: 'bar, baz', wait: '5' }],
    ['a="x\\"y"', { a: 'x"y' }],
    ['wait=3, wait=9', { wait: '3' }],
    [', ,wait=2,', { wait: '2' }],
    ['=3, wait=4', { wait: '4' }],
    ['', {}],
    // Examples of the standard, section 2 and 4.
    ['foo; some-parameter', { foo: '' }],
    ['foo=""', { foo: '' }],
    ['handling=lenient, wait=100, respond-async', { handling: 'lenient', wait: '100', 'respond-async': '' }],
  ])('is read: %s', (header, preferences) => {
    expect(Object.fromEntries(parsePrefer(header))).toEqual(preferences);
  });

  it.each([
    [undefined, null],
    ['wait=10', 10],
    ['wait=0', 0],
    ['wait=-1', null],
    ['wait=soon', null],
    ['wait=1.5', null],
    ['wait', null],
  ])('gives the wait of %s', (header, seconds) => {
    expect(preferredWait(header)).toBe(seconds);
  });

  it('is read in linear time', () => {
    expect(preferredWait(`${'a="'.repeat(50_001)}, wait=1`)).toBeNull();
  });
});
