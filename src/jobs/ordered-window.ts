/** How much of some work may be under way, or done and not taken. */
export interface WindowBounds<Result> {
  /** Most pieces that are under way or wait to be taken, ≥ 1. */
  readonly pieces: number;
  /** Bytes of results that may wait to be taken before nothing new is begun. */
  readonly bytes: number;
  readonly sizeOf: (result: Result) => number;
}

/** Begins the next piece of work when the window has room; null where there is no more. It may take its time. */
export type BeginWork<Result> = () => Promise<{ readonly work: Promise<Result> } | null>;

/**
 * The results of work that is done several pieces at a time, in the order in which it was begun, begun
 * only as fast as they are taken: pieces under way and those that are done but not taken are bounded
 * together. What is under way is handed on while the next piece cannot begin.
 */
export async function* orderedWindow<Result>(
  begin: BeginWork<Result>,
  bounds: WindowBounds<Result>,
): AsyncGenerator<Result> {
  const window = new Window(bounds);
  const feeding = feed(begin, window);
  // Told when all that was begun before has been taken.
  feeding.catch(() => undefined);
  try {
    for (;;) {
      const first = window.first;
      if (first !== undefined) {
        yield await first;
        // It counts until the next one is asked for: its reader may still hold it.
        window.drop(await first);
      } else if (window.ended) break;
      else await window.change();
    }
    await feeding;
  } finally {
    window.close();
  }
}

async function feed<Result>(begin: BeginWork<Result>, window: Window<Result>): Promise<void> {
  try {
    for (;;) {
      while (window.isFull) await window.change();
      if (window.ended) return;
      const begun = await begin();
      if (begun === null) return;
      window.add(begun.work);
    }
  } finally {
    window.close();
  }
}

class Window<Result> {
  readonly #bounds: WindowBounds<Result>;
  readonly #pieces: Promise<Result>[] = [];
  #bytes = 0;
  #ended = false;
  #wake: (() => void)[] = [];

  constructor(bounds: WindowBounds<Result>) {
    this.#bounds = bounds;
  }

  /** Whether nothing more is added. */
  get ended(): boolean {
    return this.#ended;
  }

  get first(): Promise<Result> | undefined {
    return this.#pieces[0];
  }

  get isFull(): boolean {
    const { pieces, bytes } = this.#bounds;
    return !this.#ended && this.#pieces.length > 0 && (this.#pieces.length >= pieces || this.#bytes >= bytes);
  }

  add(work: Promise<Result>): void {
    const counted = work.then((result) => {
      this.#bytes += this.#bounds.sizeOf(result);
      return result;
    });
    // Who takes it sees the error; until then it is nobody's.
    counted.catch(() => undefined);
    this.#pieces.push(counted);
    this.#changed();
  }

  /** Gives up the first piece, whose result has been used up. */
  drop(result: Result): void {
    void this.#pieces.shift();
    this.#bytes -= this.#bounds.sizeOf(result);
    this.#changed();
  }

  close(): void {
    this.#ended = true;
    this.#changed();
  }

  change(): Promise<void> {
    return new Promise((resolve) => this.#wake.push(resolve));
  }

  #changed(): void {
    for (const wake of this.#wake.splice(0)) wake();
  }
}
