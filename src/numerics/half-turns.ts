/** sin π x, exact at whole and half numbers. */
export function sinPi(x: number): number {
  const turn = x - 2 * Math.round(x / 2);
  if (Math.abs(turn) <= 0.25) return Math.sin(Math.PI * turn);
  if (Math.abs(turn) >= 0.75) return Math.sin(Math.PI * (Math.sign(turn) - turn));
  return Math.sign(turn) * Math.cos(Math.PI * (0.5 - Math.abs(turn)));
}

/** cos π x, exact at whole and half numbers. */
export function cosPi(x: number): number {
  return sinPi(x + 0.5);
}
