import { brotliCompressSync, brotliDecompressSync, constants, gunzipSync, gzipSync } from 'node:zlib';

/** Content codings (RFC 9110, section 8.4.1; br: RFC 7932). */
export type ContentCoding = 'identity' | 'gzip' | 'br';

/** Below this size in bytes a coding saves no packet worth its time. */
export const smallestCoded = 1400;

/** Whether bytes are too few for a coding. */
export function isSmall({ byteLength }: Uint8Array): boolean {
  return byteLength < smallestCoded;
}

/** Fast levels: of numbers as text the thorough ones save little more (test/bench). */
const gzipLevel = 1;
const brotliQuality = 1;

/**
 * Bytes in a content coding: the first one that the reader takes, but none for a small answer where
 * the reader takes it as it is.
 *
 * @param bytes in a buffer of their own
 * @param codings those that the reader takes, the preferred first
 * @returns the same bytes, or coded ones in a buffer of their own
 */
export function compress(
  bytes: Uint8Array<ArrayBuffer>,
  codings: readonly ContentCoding[],
): { readonly bytes: Uint8Array<ArrayBuffer>; readonly coding: ContentCoding } {
  const small = isSmall(bytes) && codings.includes('identity');
  const coding = small ? 'identity' : codings[0];
  switch (coding) {
    case 'identity':
      return { bytes, coding };
    case 'gzip':
      return { bytes: new Uint8Array(gzipSync(bytes, { level: gzipLevel })), coding };
    case 'br': {
      const params = {
        [constants.BROTLI_PARAM_QUALITY]: brotliQuality,
        [constants.BROTLI_PARAM_SIZE_HINT]: bytes.byteLength,
      };
      return { bytes: new Uint8Array(brotliCompressSync(bytes, { params })), coding };
    }
  }
}

/** What {@link compress} has made, as it was before. */
export function decompress(bytes: Uint8Array, coding: ContentCoding): Uint8Array {
  if (coding === 'identity') return bytes;
  return coding === 'gzip' ? gunzipSync(bytes) : brotliDecompressSync(bytes);
}
