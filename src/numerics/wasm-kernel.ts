/** Bytes of one page of a kernel's memory. */
const PAGE = 65536;

/** Memory of a kernel; it only grows, and views of it are then made anew. */
export interface KernelMemory {
  readonly buffer: ArrayBuffer;
  grow(pages: number): number;
}

/** What is used of the WebAssembly interface, which the compiler's library for ES2023 does not declare. */
interface WasmApi {
  readonly Module: new (bytes: Uint8Array) => object;
  readonly Instance: new (module: object, imports: object) => { readonly exports: object };
}

/**
 * A committed kernel: its bytes are read and compiled once, every instance has a memory of its own.
 *
 * @typeParam Exports what its source exports
 */
export class WasmKernel<Exports extends { readonly memory: KernelMemory }> {
  private readonly lines: readonly string[];
  private module: object | null = null;

  /** @param lines base64 */
  constructor(lines: readonly string[]) {
    this.lines = lines;
  }

  /** A new instance, its memory zero. */
  instantiate(): Exports {
    const { Module, Instance } = (globalThis as unknown as { WebAssembly: WasmApi }).WebAssembly;
    this.module ??= new Module(decodeBase64(this.lines.join('')));
    return new Instance(this.module, {}).exports as Exports;
  }
}

/** Makes a memory hold that many bytes; whether it had to grow, which ends all views of it. */
export function growTo(memory: KernelMemory, bytes: number): boolean {
  const pages = Math.ceil(bytes / PAGE) - memory.buffer.byteLength / PAGE;
  if (pages <= 0) return false;
  memory.grow(pages);
  return true;
}

function decodeBase64(text: string): Uint8Array {
  const digits = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/';
  const bytes: number[] = [];
  let bits = 0;
  let held = 0;
  for (const digit of text) {
    if (digit === '=') break;
    bits = ((bits << 6) | digits.indexOf(digit)) & 0xffff;
    held += 6;
    if (held >= 8) {
      held -= 8;
      bytes.push((bits >> held) & 0xff);
    }
  }
  return Uint8Array.from(bytes);
}
