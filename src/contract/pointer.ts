/** RFC 6901 pointer to a key of the object that `pointer` points to. */
export function child(pointer: string, key: string): string {
  return `${pointer}/${key.replaceAll('~', '~0').replaceAll('/', '~1')}`;
}

/** The last key or index of a pointer, unescaped; empty for the whole document. */
export function lastKey(pointer: string): string {
  return pointer
    .slice(pointer.lastIndexOf('/') + 1)
    .replaceAll('~1', '/')
    .replaceAll('~0', '~');
}

/** What a pointer leads to as a reader names it: `length`, `item 3 of positions`, `the request`. */
export function placeName(pointer: string): string {
  if (pointer === '') return 'the request';
  const last = lastKey(pointer);
  if (!/^\d+$/.test(last)) return last;
  return `item ${last} of ${placeName(pointer.slice(0, pointer.lastIndexOf('/')))}`;
}

/** Whether `pointer` leads to `ancestor` or into it. */
export function isWithin(pointer: string, ancestor: string): boolean {
  return pointer === ancestor || pointer.startsWith(`${ancestor}/`);
}
