/** Weight of the newest solve in the running mean; tuned by eye, no source. */
const newestWeight = 0.2;
const longestAdvice = 60;

/** Running mean of solve times, for advice on when to come back. */
export class LoadEstimate {
  #meanSeconds = 0.1;

  /** @param seconds time of one finished solve, s */
  record(seconds: number): void {
    this.#meanSeconds += newestWeight * (seconds - this.#meanSeconds);
  }

  /**
   * Whole seconds until the requests in the pool are likely done, from 1 to 60.
   *
   * @param requests running and waiting
   * @param workers threads that share them
   */
  secondsUntilFree(requests: number, workers: number): number {
    return Math.min(longestAdvice, Math.max(1, Math.ceil((requests * this.#meanSeconds) / workers)));
  }
}
