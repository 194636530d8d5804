/** A complex number. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const ZERO: Complex = { re: 0, im: 0 };
export const ONE: Complex = { re: 1, im: 0 };

export function complex(re: number, im = 0): Complex {
  return { re, im };
}

export function add(a: Complex, b: Complex): Complex {
  return { re: a.re + b.re, im: a.im + b.im };
}

export function subtract(a: Complex, b: Complex): Complex {
  return { re: a.re - b.re, im: a.im - b.im };
}

export function multiply(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

export function scale(a: Complex, factor: number): Complex {
  return { re: a.re * factor, im: a.im * factor };
}

/** a / b by Smith's method, without overflow of |b|². */
export function divide(a: Complex, b: Complex): Complex {
  if (Math.abs(b.re) >= Math.abs(b.im)) {
    const ratio = b.im / b.re;
    const size = b.re + b.im * ratio;
    return { re: (a.re + a.im * ratio) / size, im: (a.im - a.re * ratio) / size };
  }
  const ratio = b.re / b.im;
  const size = b.re * ratio + b.im;
  return { re: (a.re * ratio + a.im) / size, im: (a.im * ratio - a.re) / size };
}

export function modulus(a: Complex): number {
  return Math.hypot(a.re, a.im);
}

/** The square root with real part ≥ 0. */
export function squareRoot(a: Complex): Complex {
  const size = modulus(a);
  if (size === 0) return ZERO;
  if (a.re >= 0) {
    const re = Math.sqrt(0.5 * (size + a.re));
    return { re, im: a.im / (2 * re) };
  }
  const im = Math.sqrt(0.5 * (size - a.re));
  const sign = a.im < 0 ? -1 : 1;
  return { re: Math.abs(a.im) / (2 * im), im: sign * im };
}

/** e^a. */
export function exponential(a: Complex): Complex {
  const size = Math.exp(a.re);
  return { re: size * Math.cos(a.im), im: size * Math.sin(a.im) };
}
