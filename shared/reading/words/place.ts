/** Where a problem is and what stands there. `say` is a word or number that its message needs. */
export type Place = {
  row?: number | null;
  column?: string | null;
  value?: string | null;
  say?: string | number;
  /** What a question is about. */
  about?: string;
};
