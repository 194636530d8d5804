import { Readable } from 'node:stream';

/** Largest piece that is given to the socket at once: the kernel copies it while the event loop waits. */
const pieceSize = 256 * 1024;

/** The bytes themselves, or a stream of pieces where they are many, so that other requests come between. */
export function inPieces(bytes: Buffer): Buffer | Readable {
  if (bytes.length <= pieceSize) return bytes;
  let sent = 0;
  return new Readable({
    read() {
      const next = Math.min(sent + pieceSize, bytes.length);
      this.push(sent === bytes.length ? null : bytes.subarray(sent, next));
      sent = next;
    },
  });
}
