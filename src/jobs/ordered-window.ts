/**
 * Work that is done several pieces at a time and handed on in order, begun only as fast as it is
 * taken: pieces under way and those that are done but not taken are bounded together.
 */
export interface WindowBounds<Result> {
  /** Most pieces that are under way or wait to be taken, ≥ 1. */
  readonly pieces: number;
  /** Bytes of results that may wait to be taken before nothing new is begun. */
  readonly bytes: number;
  readonly sizeOf: (result: Result) => number;
}

/**
 * The results of work in the order in which it was begun.
 *
 * @param begin begins the next piece of work when the window has room: null where there is no more; it
 *   may take its time, what is under way is handed on meanwhile
 */
export async function* orderedWindow<Result>(
  begin: () => Promise<{ readonly work: Promise<Result> } | null>,
  { pieces, bytes, sizeOf }: WindowBounds<Result>,
): AsyncGenerator<Result> {
  const window: Promise<Result>[] = [];
  let waitingBytes = 0;
  let wake: () => void = () => undefined;
  let ended = false;
  let closed = false;
  const changed = (): Promise<void> => new Promise((resolve) => (wake = resolve));
  let feedChanged: () => void = () => undefined;

  const isOpen = (): boolean => window.length < pieces && (waitingBytes < bytes || window.length === 0);

  async function feed(): Promise<void> {
    try {
      for (;;) {
        while (!isOpen() && !closed) await new Promise<void>((resolve) => (feedChanged = resolve));
        if (closed) return;
        const begun = await begin();
        if (begun === null) return;
        const counted = begun.work.then((result) => {
          waitingBytes += sizeOf(result);
          return result;
        });
        // Who takes it sees the error; until then it is nobody's.
        counted.catch(() => undefined);
        window.push(counted);
        wake();
      }
    } finally {
      ended = true;
      wake();
    }
  }

  const feeding = feed();
  feeding.catch(() => undefined);
  try {
    for (;;) {
      if (window.length === 0) {
        if (ended) break;
        await changed();
        continue;
      }
      const result = await window[0];
      window.shift();
      // It counts until the next one is asked for: its reader may still hold it.
      yield result;
      waitingBytes -= sizeOf(result);
      feedChanged();
    }
    await feeding;
  } finally {
    closed = true;
    feedChanged();
  }
}
