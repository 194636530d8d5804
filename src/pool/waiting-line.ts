/** So many of those in front pass one who gives way; then it is served, so that nobody waits for ever. */
const mostPassing = 4;

/**
 * The line before the workers: first come, first served, but those who give way (lines of batches,
 * jobs) let the others pass, up to a share of one in five.
 */
export class WaitingLine<Item> {
  readonly #front: Item[] = [];
  readonly #givingWay: Item[] = [];
  #passed = 0;

  /** Number that wait and do not give way. */
  get length(): number {
    return this.#front.length;
  }

  add(item: Item, givesWay: boolean): void {
    (givesWay ? this.#givingWay : this.#front).push(item);
  }

  /** The next one, taken out of the line; undefined where nobody waits. */
  take(): Item | undefined {
    const pass = this.#givingWay.length === 0 || this.#passed < mostPassing;
    const next = pass ? this.#front.shift() : undefined;
    if (next === undefined) {
      this.#passed = 0;
      return this.#givingWay.shift();
    }
    if (this.#givingWay.length > 0) this.#passed++;
    return next;
  }

  remove(item: Item): void {
    for (const line of [this.#front, this.#givingWay]) {
      const place = line.indexOf(item);
      if (place >= 0) line.splice(place, 1);
    }
  }

  /** Everybody in the line. */
  all(): Item[] {
    return [...this.#front, ...this.#givingWay];
  }
}
