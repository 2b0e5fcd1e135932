/** One benchmark: what was measured, what it is held against in the same run, and their ratio. */
export interface Figure {
  name: string;
  value: number;
  denominator: number;
  ratio: number;
  /** Unit of value and denominator. */
  unit: string;
}

export const figure = (name: string, unit: string, value: number, denominator: number): Figure => ({ name, unit, value, denominator, ratio: value / denominator });
