/** A rational number numerator / denominator, denominator > 0. */
interface Rational {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

function ofDouble(x: number): Rational {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, x);
  const bits = view.getBigUint64(0);
  const biased = Number((bits >> 52n) & 0x7ffn);
  const fraction = bits & 0xfffffffffffffn;
  const magnitude = biased === 0 ? fraction : fraction | 0x10000000000000n;
  const exponent = (biased === 0 ? 1 : biased) - 1075;
  const signed = bits >> 63n === 1n ? -magnitude : magnitude;
  return exponent >= 0
    ? { numerator: signed << BigInt(exponent), denominator: 1n }
    : { numerator: signed, denominator: 1n << BigInt(-exponent) };
}

function ofDecimal(text: string): Rational {
  const match = /^(-?)(\d+)(?:\.(\d*))?(?:e([+-]?\d+))?$/i.exec(text);
  if (match === null) throw new Error(`not a decimal number: ${text}`);
  const [, sign, whole, decimals = '', exponent = '0'] = match;
  const digits = BigInt(whole + decimals);
  const shift = Number(exponent) - decimals.length;
  const signed = sign === '-' ? -digits : digits;
  return shift >= 0
    ? { numerator: signed * 10n ** BigInt(shift), denominator: 1n }
    : { numerator: signed, denominator: 10n ** BigInt(-shift) };
}

/** Sign of x − decimal, without any rounding: −1, 0 or 1. */
export function compareWithDecimal(x: number, decimal: string): -1 | 0 | 1 {
  const a = ofDouble(x);
  const b = ofDecimal(decimal);
  const difference = a.numerator * b.denominator - b.numerator * a.denominator;
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}
