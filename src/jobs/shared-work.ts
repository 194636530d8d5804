interface Flight<Value> {
  readonly work: Promise<Value>;
  readonly stopper: AbortController;
  members: number;
}

/** A place in work that is done once for all who want it. */
export interface Place<Value> {
  readonly work: Promise<Value>;
  /** Gives the place up, once; work that nobody waits for any more is stopped. */
  readonly leave: () => void;
}

/** Does the same work only once for all who want it at the same time. */
export class SharedWork<Value> {
  readonly #flights = new Map<string, Flight<Value>>();

  /**
   * Joins the work that is under way under this key, or starts it.
   *
   * @param start does the work; its signal aborts when all have left
   */
  join(key: string, start: (abandoned: AbortSignal) => Promise<Value>): Place<Value> {
    const flight = this.#flights.get(key) ?? this.#begin(key, start);
    flight.members++;
    return {
      work: flight.work,
      leave: () => {
        flight.members--;
        if (flight.members > 0) return;
        this.#end(key, flight);
        flight.stopper.abort();
      },
    };
  }

  #begin(key: string, start: (abandoned: AbortSignal) => Promise<Value>): Flight<Value> {
    const stopper = new AbortController();
    const flight: Flight<Value> = {
      stopper,
      members: 0,
      work: start(stopper.signal).finally(() => this.#end(key, flight)),
    };
    this.#flights.set(key, flight);
    return flight;
  }

  /** Whoever comes now starts anew. */
  #end(key: string, flight: Flight<Value>): void {
    if (this.#flights.get(key) === flight) this.#flights.delete(key);
  }
}
