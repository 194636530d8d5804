import type { ContentCoding } from '../encoding/compress.ts';

/** Weight of identity where the header does not name it: acceptable, but below whatever is named. */
const unnamedIdentity = 1e-4;

/**
 * The content codings of an Accept-Encoding header (RFC 9110, section 12.5.3) among those offered, by
 * weight; among equal weights in the order of the offer, which the libraries do not do.
 *
 * @param header undefined where there is none: then only identity, as the client may not know any coding
 * @param offered the preferred first
 * @returns none where the client takes none of them
 */
export function acceptedCodings(
  header: string | undefined,
  offered: readonly ContentCoding[],
): readonly ContentCoding[] {
  if (header === undefined) return ['identity'];
  const weights = new Map(header.split(',').map(weightedCoding));
  const weightOf = (coding: ContentCoding): number => {
    const given = weights.get(coding) ?? (coding === 'gzip' ? weights.get('x-gzip') : undefined);
    if (given !== undefined) return given;
    const others = weights.get('*');
    return coding === 'identity' && others !== 0 ? unnamedIdentity : (others ?? 0);
  };
  return offered.filter((coding) => weightOf(coding) > 0).toSorted((a, b) => weightOf(b) - weightOf(a));
}

/** A weight that cannot be read counts as 1. */
function weightedCoding(part: string): [coding: string, weight: number] {
  const [coding, ...parameters] = part.split(';').map((text) => text.trim().toLowerCase());
  const weight = parameters.find((text) => /^q[ \t]*=/.test(text))?.split('=')[1];
  const read = weight === undefined ? 1 : Number(weight);
  return [coding, Number.isNaN(read) ? 1 : read];
}
