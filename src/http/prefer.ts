/** One preference: `name[=value]`, then parameters that no preference of ours takes (RFC 7240, section 2). */
const preference =
  /^[ \t]*(?<name>[!#$%&'*+.^_`|~\w-]+)[ \t]*(?:=[ \t]*(?:"(?<quoted>(?:[^"\\]|\\.)*)"|(?<token>[!#$%&'*+.^_`|~\w-]*)))?[ \t]*(?:;|$)/;

/**
 * The preferences of a `Prefer` header (RFC 7240): lower-case names to values, '' where there is
 * none. The first of several wins; what cannot be read is skipped, as the standard allows.
 *
 * @param header the header, several joined by commas
 */
export function parsePrefer(header: string): ReadonlyMap<string, string> {
  const preferences = new Map<string, string>();
  for (const part of splitAtCommas(header)) {
    const groups = preference.exec(part)?.groups;
    if (groups === undefined) continue;
    const name = groups.name.toLowerCase();
    const value = groups.quoted?.replace(/\\(.)/g, '$1') ?? groups.token ?? '';
    if (!preferences.has(name)) preferences.set(name, value);
  }
  return preferences;
}

/** Seconds of `Prefer: wait=N` (RFC 7240, section 4.3), or null where there is none. */
export function preferredWait(header: string | string[] | undefined): number | null {
  if (header === undefined) return null;
  const wait = parsePrefer(String(header)).get('wait');
  return wait !== undefined && /^\d{1,9}$/.test(wait) ? Number(wait) : null;
}

/** Whether a `Prefer` header asks to be answered later: `respond-async` (RFC 7240, section 4.1). */
export function prefersAsync(header: string | string[] | undefined): boolean {
  return header !== undefined && parsePrefer(String(header)).has('respond-async');
}

function splitAtCommas(header: string): string[] {
  return header.match(/(?:[^",]|"(?:[^"\\]|\\.)*"?)+/g) ?? [];
}
