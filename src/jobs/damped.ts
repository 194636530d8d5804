/** Time for which the same trouble is told only once, ms. */
const quiet = 30_000;

/** Passes errors on, but equal ones in a row only now and then: a server that is away is tried every second. */
export function damped(tell: (error: unknown) => void): (error: unknown) => void {
  let last = '';
  let told = 0;
  return (error) => {
    const text = String(error);
    if (text === last && Date.now() - told < quiet) return;
    last = text;
    told = Date.now();
    tell(error);
  };
}
