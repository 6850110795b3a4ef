/** One numbered line of the method page. */
export interface Equation {
  /** Parts of one line; they wrap on a phone. */
  readonly parts: readonly { readonly tex: string; readonly spoken: string }[];
  /** Symbol in TeX, then its meaning. */
  readonly where?: readonly (readonly [string, string])[];
}
