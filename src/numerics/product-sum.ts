import { PRODUCT_KERNEL } from './product-kernel.ts';
import { growTo, WasmKernel, type KernelMemory } from './wasm-kernel.ts';

/** Rows and columns are handled in panels of four. */
const PANEL = 4;
/** Panels of rows packed at once, so that they stay in the cache and are not fetched anew for every sum. */
const PACKED_PANELS = 128;
/** Fewer rows than this are summed one by one: panels would be mostly padding. */
const FEW_ROWS = 3;

interface Kernel {
  readonly memory: KernelMemory;
  addProduct(n: number, a: number, rowPanels: number, b: number, columnPanels: number, c: number): void;
}

const product = new WasmKernel<Kernel>(PRODUCT_KERNEL);

/**
 * Running sum C += Aᵀ B of table products, rows × columns, in double precision by a SIMD kernel on
 * panels of 4 × 4 (product-kernel.wat).
 *
 * Every entry is summed over the rows of one call in ascending order, then added to C, without fused
 * or relaxed operations, so the bits depend on neither tiling nor machine. Cost: 2 flops an entry and
 * table row, at about the speed of one multiplication and addition a lane and cycle.
 */
export class ProductSum {
  private readonly rows: number;
  private readonly columns: number;
  private readonly rowPanels: number;
  private readonly columnPanels: number;
  private readonly kernel: Kernel | null;
  private readonly packedA: Float64Array;
  private readonly packedB: Float64Array;
  private readonly packedC: Float64Array;
  /** The sum of few rows, and of one block of them. */
  private readonly plain: Float64Array;
  private readonly block: Float64Array;

  /** @param depth most rows that A and B have in one call */
  constructor(rows: number, columns: number, depth: number) {
    this.rows = rows;
    this.columns = columns;
    this.rowPanels = Math.ceil(rows / PANEL);
    this.columnPanels = Math.ceil(columns / PANEL);
    const few = rows <= FEW_ROWS;
    this.plain = new Float64Array(few ? rows * columns : 0);
    this.block = new Float64Array(few ? columns : 0);
    if (few) {
      this.kernel = null;
      this.packedA = this.packedB = this.packedC = this.plain;
      return;
    }
    this.kernel = product.instantiate();
    const sizeA = depth * PANEL * Math.min(PACKED_PANELS, this.rowPanels);
    const sizeB = depth * PANEL * this.columnPanels;
    const sizeC = PANEL * PANEL * this.rowPanels * this.columnPanels;
    const { memory } = this.kernel;
    growTo(memory, 8 * (sizeA + sizeB + sizeC));
    this.packedA = new Float64Array(memory.buffer, 0, sizeA);
    this.packedB = new Float64Array(memory.buffer, 8 * sizeA, sizeB);
    this.packedC = new Float64Array(memory.buffer, 8 * (sizeA + sizeB), sizeC);
  }

  /** Adds Aᵀ B of the first n rows of A [n × rows] and B [n × columns]. */
  add(n: number, a: Float64Array, b: Float64Array): void {
    if (this.kernel === null) {
      this.addFew(n, a, b);
      return;
    }
    const { kernel, rows, columns, rowPanels, columnPanels, packedA, packedB, packedC } = this;
    pack(b, columns, n, 0, columns, packedB);
    for (let panel = 0; panel < rowPanels; panel += PACKED_PANELS) {
      const panels = Math.min(PACKED_PANELS, rowPanels - panel);
      pack(a, rows, n, PANEL * panel, Math.min(rows, PANEL * (panel + panels)), packedA);
      kernel.addProduct(
        n,
        packedA.byteOffset,
        panels,
        packedB.byteOffset,
        columnPanels,
        packedC.byteOffset + 8 * PANEL * PANEL * columnPanels * panel,
      );
    }
  }

  /** The same sums in the same order, row by row. */
  private addFew(n: number, a: Float64Array, b: Float64Array): void {
    const { rows, columns, plain, block } = this;
    for (let r = 0; r < rows; r++) {
      block.fill(0);
      for (let m = 0; m < n; m++) {
        const factor = a[m * rows + r];
        for (let q = 0, at = m * columns; q < columns; q++, at++) block[q] += factor * b[at];
      }
      for (let q = 0, at = r * columns; q < columns; q++, at++) plain[at] += block[q];
    }
  }

  /** The sum, shape [rows × columns] row-major. */
  values(): Float64Array {
    const { rows, columns, columnPanels, packedC } = this;
    if (this.kernel === null) return this.plain;
    const values = new Float64Array(rows * columns);
    for (let r = 0; r < rows; r++) {
      const from = (Math.floor(r / PANEL) * columnPanels * PANEL + (r % PANEL)) * PANEL;
      for (let q = 0, at = r * columns; q < columns; q++, at++) {
        values[at] = packedC[from + Math.floor(q / PANEL) * PANEL * PANEL + (q % PANEL)];
      }
    }
    return values;
  }
}

/** Columns [begin, end) of [m][width] to [panel][m][4], the last panel filled up with zeros. */
function pack(
  table: Float64Array,
  width: number,
  n: number,
  begin: number,
  end: number,
  into: Float64Array,
): void {
  for (let first = begin, at = 0; first < end; first += PANEL) {
    if (first + PANEL <= end) {
      for (let m = 0, from = first; m < n; m++, from += width, at += PANEL) {
        into[at] = table[from];
        into[at + 1] = table[from + 1];
        into[at + 2] = table[from + 2];
        into[at + 3] = table[from + 3];
      }
    } else {
      for (let m = 0; m < n; m++) {
        for (let lane = 0; lane < PANEL; lane++, at++) {
          into[at] = first + lane < end ? table[m * width + first + lane] : 0;
        }
      }
    }
  }
}
