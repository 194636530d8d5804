import { crc32, deflateSync } from 'node:zlib';

/**
 * A picture with at most 256 colours as PNG (ISO/IEC 15948): colour type 3, rows filtered by Up, because
 * neighbouring rows of a field are often the same.
 *
 * @param pixels index of the colour, row by row, shape [height · width]
 * @param palette red, green, blue of every colour, shape [3 · colours]
 */
export function indexedPng(pixels: Uint8Array, width: number, height: number, palette: Uint8Array): Buffer {
  const rows = new Uint8Array(height * (width + 1));
  rows[0] = 2;
  rows.set(pixels.subarray(0, width), 1);
  for (let y = 1; y < height; y++) {
    const row = y * (width + 1);
    const first = y * width;
    rows[row] = 2;
    for (let x = 0; x < width; x++) rows[row + 1 + x] = pixels[first + x] - pixels[first + x - width];
  }
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  // 8 bits, indexed, deflate, adaptive filters, not interlaced
  header.set([8, 3, 0, 0, 0], 8);
  return Buffer.concat([
    Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a),
    chunk('IHDR', header),
    chunk('PLTE', palette),
    chunk('IDAT', deflateSync(rows, { level: 3 })),
    chunk('IEND', new Uint8Array(0)),
  ]);
}

function chunk(type: string, data: Uint8Array): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const whole = Buffer.alloc(body.length + 8);
  whole.writeUInt32BE(data.length, 0);
  whole.set(body, 4);
  whole.writeUInt32BE(crc32(body), body.length + 4);
  return whole;
}
