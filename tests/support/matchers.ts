import { expect } from "vitest";

interface AgreeMatchers<R = unknown> {
  /** Relative agreement: |received / expected - 1| <= relative. Never passes for NaN, null or 0 against a value. */
  toAgreeWithin(expected: number, relative: number): R;
}

declare module "vitest" {
  // eslint-disable-next-line @typescript-eslint/no-explicit-any, @typescript-eslint/no-empty-object-type -- vitest's own signature
  interface Matchers<T = any> extends AgreeMatchers<T> {}
}

expect.extend({
  toAgreeWithin(received: unknown, expected: number, relative: number) {
    const isNumber = typeof received === "number" && Number.isFinite(received);
    const ratio = isNumber ? received / expected : Number.NaN;
    const pass = isNumber && Math.abs(ratio - 1) <= relative;
    return {
      pass,
      message: () =>
        `expected ${String(received)} to agree with ${expected} within ${relative * 100} % (ratio ${ratio.toPrecision(8)})`,
    };
  },
});
