import { brotliDecompressSync, gunzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { compress, decompress, smallestCoded } from '../../src/encoding/compress.ts';

const large = new TextEncoder().encode('0.1234567,'.repeat(1000));
const small = large.slice(0, smallestCoded - 1);

describe('content codings', () => {
  it('are undone by general readers, and by our own', () => {
    const gzip = compress(large, ['gzip', 'identity']);
    const br = compress(large, ['br', 'gzip']);
    expect([gzip.coding, br.coding]).toEqual(['gzip', 'br']);
    expect(new Uint8Array(gunzipSync(gzip.bytes))).toEqual(large);
    expect(new Uint8Array(brotliDecompressSync(br.bytes))).toEqual(large);
    for (const { bytes, coding } of [gzip, br, compress(large, ['identity', 'br'])]) {
      expect(new Uint8Array(decompress(bytes, coding))).toEqual(large);
    }
  });

  it('leave small answers alone, unless their reader takes nothing else', () => {
    expect(compress(small, ['br', 'identity'])).toEqual({ bytes: small, coding: 'identity' });
    expect(compress(small, ['gzip']).coding).toBe('gzip');
  });

  it('come in buffers of their own, which can move to another thread', () => {
    for (const coding of ['gzip', 'br'] as const) {
      const { bytes } = compress(small, [coding]);
      expect(bytes.buffer.byteLength).toBe(bytes.byteLength);
    }
  });
});
