/** Keys that mean the same in members of different kinds. */
const counterparts: readonly (readonly string[])[] = [
  ['mass', 'inertia'],
  ['massPerLength', 'inertiaPerLength', 'inertia'],
  ['axialStiffness', 'torsionalStiffness', 'shearStiffness', 'stiffness'],
  ['youngsModulus', 'shearModulus'],
  ['position', 'at'],
  ['amplitude', 'value'],
  ['value', 'values'],
  ['start', 'from'],
  ['end', 'to'],
];

/**
 * The key that was probably meant: one that differs by a slip of the pen (up to two letters, or
 * their case), or the counterpart in another kind of member.
 */
export function likelyKey(key: string, allowed: readonly string[]): string | null {
  if (key.length > 40) return null;
  const written = key.toLowerCase().replaceAll(/[-_ ]/g, '');
  let best: string | null = null;
  let bestDistance = Math.min(3, Math.ceil(written.length / 2));
  for (const candidate of allowed) {
    const distance = editDistance(written, candidate.toLowerCase());
    if (distance < bestDistance) [best, bestDistance] = [candidate, distance];
  }
  if (best !== null) return best;
  const same = counterparts.find(
    (group) => group.includes(key) && group.some((other) => allowed.includes(other)),
  );
  return same?.find((other) => allowed.includes(other)) ?? null;
}

/** Number of letters to insert, delete or replace (Levenshtein 1966). */
function editDistance(left: string, right: string): number {
  let row = Array.from({ length: right.length + 1 }, (_, index) => index);
  for (let i = 1; i <= left.length; i++) {
    const next = [i];
    for (let j = 1; j <= right.length; j++) {
      const replaced = row[j - 1] + (left[i - 1] === right[j - 1] ? 0 : 1);
      next.push(Math.min(replaced, row[j] + 1, next[j - 1] + 1));
    }
    row = next;
  }
  return row[right.length];
}
