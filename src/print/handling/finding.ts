/** One thing measured on a model, set beside the figure it is to be compared with. */
export interface Finding<Code extends string = string> {
  readonly code: Code;
  /** `refuse`: it cannot be printed. `warning`: something to change or to decide. `note`: a measurement. */
  readonly severity: 'refuse' | 'warning' | 'note';
  /** The part it is about; null: the whole model. */
  readonly part: string | null;
  readonly measured: number;
  /** Null where there is no figure to compare with. */
  readonly figure: number | null;
  readonly unit: string;
  /** Where the figure, or the way of measuring, comes from. */
  readonly source: string;
  /** What was measured and what to change, in sentences. */
  readonly text: string;
}
