/** An exact fraction in lowest terms, the denominator positive. */
export type Rational = { readonly n: bigint; readonly d: bigint };

export const ZERO: Rational = { n: 0n, d: 1n };

function gcd(a: bigint, b: bigint): bigint {
  let [x, y] = [a < 0n ? -a : a, b < 0n ? -b : b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

export function rational(n: bigint, d = 1n): Rational {
  const common = gcd(n, d) || 1n;
  const sign = d < 0n ? -1n : 1n;
  return { n: (sign * n) / common, d: (sign * d) / common };
}

export function add(a: Rational, b: Rational): Rational {
  return a.d === b.d ? rational(a.n + b.n, a.d) : rational(a.n * b.d + b.n * a.d, a.d * b.d);
}

export function subtract(a: Rational, b: Rational): Rational {
  return add(a, { n: -b.n, d: b.d });
}

export function multiply(a: Rational, b: Rational): Rational {
  return rational(a.n * b.n, a.d * b.d);
}

export function divide(a: Rational, b: Rational): Rational {
  return rational(a.n * b.d, a.d * b.n);
}

/** Negative, zero or positive, as a is less than, equal to or greater than b. */
export function compare(a: Rational, b: Rational): number {
  const difference = a.n * b.d - b.n * a.d;
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}

export function toNumber(value: Rational): number {
  return Number(value.n) / Number(value.d);
}

/** "5/2", or "11" for a whole number. */
export function toFraction(value: Rational): string {
  return value.d === 1n ? String(value.n) : `${String(value.n)}/${String(value.d)}`;
}

/** Reads a plain decimal of at most so many digits ("480", "0.5"); null for anything else, also for signs and exponents. */
export function parseDecimal(text: string, digits: number, decimals: number): Rational | null {
  const match = /^\+?(\d*)(?:\.(\d*))?$/.exec(text.trim());
  const [, whole = "", fraction = ""] = match ?? [];
  if (!match || whole + fraction === "" || whole.length > digits || fraction.length > decimals) {
    return null;
  }
  return rational(BigInt(whole + fraction), 10n ** BigInt(fraction.length));
}
