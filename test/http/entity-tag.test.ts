import { describe, expect, it } from 'vitest';
import { namedTag } from '../../src/http/entity-tag.ts';

const tags = ['"a-1"', '"b_2"'];

// Forms of the header: RFC 9110, sections 8.8.3 and 13.1.2.
describe('If-None-Match', () => {
  it.each([
    ['"a-1"', '"a-1"'],
    ['W/"a-1"', '"a-1"'],
    ['"x", "b_2"', '"b_2"'],
    ['"b_2" ,W/"a-1"', '"a-1"'],
    ['"x,y", W/"b_2"', '"b_2"'],
    ['*', '"a-1"'],
    [' * ', '"a-1"'],
  ])('%s names a tag', (header, tag) => {
    expect(namedTag(header, tags)).toBe(tag);
  });

  it.each([[undefined], [''], ['"a"'], ['a-1'], ['"A-1"'], ['"*"'], ['W/"x", "y"']])(
    '%s names none',
    (header) => {
      expect(namedTag(header, tags)).toBeNull();
    },
  );
});
