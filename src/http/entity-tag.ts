/** A strong entity tag (RFC 9110, section 8.8.3). */
export function entityTag(key: string): string {
  return `"${key}"`;
}

/** `*`, or entity tags in quotes, weak or strong (RFC 9110, section 13.1.2). */
const tagPattern = /(?:W\/)?("[\x21\x23-\x7e\x80-\xff]*")/g;

/**
 * The first of several tags that If-None-Match names, compared weakly (proxies weaken tags when they
 * recode an answer); `*` names any. Null where it names none.
 *
 * @param header the header, several joined by commas
 * @param tags strong tags of what may be sent
 */
export function namedTag(header: string | undefined, tags: readonly string[]): string | null {
  if (header === undefined) return null;
  if (header.trim() === '*') return tags[0];
  const named = new Set(Array.from(header.matchAll(tagPattern), ([, tag]) => tag));
  return tags.find((tag) => named.has(tag)) ?? null;
}
