import { readFileSync } from 'node:fs';

/** Numbers computed at 40 digits or more by motion-values.py, which says how. */
export interface MotionValues {
  /** a, v, ω, c, t and q, q′ there. */
  readonly freeMotion: readonly (readonly [number, number, number, number, number, string, string])[];
  /** a, v, ω, c, t and the energy lost. */
  readonly dissipated: readonly (readonly [number, number, number, number, number, string])[];
  readonly powers: readonly {
    readonly length: number;
    readonly square: number;
    readonly value: number;
    readonly slope: number;
    readonly farValue: string;
    readonly integrals: readonly string[];
  }[];
  /** Mode, degree and m(x^degree on [1/4, 7/4], φ). */
  readonly uniform: readonly (readonly [number, number, string])[];
  readonly stepped: readonly {
    readonly order: number;
    readonly omega: string;
    readonly products: Readonly<Record<'polyline' | 'polynomial' | 'bump' | 'half-sine' | 'uniform', string>>;
  }[];
}

export const motionValues = JSON.parse(
  readFileSync(new URL('./motion-values.json', import.meta.url), 'utf8'),
) as MotionValues;
