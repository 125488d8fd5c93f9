/** A solid's specific Gibbs energy and its derivatives at the last evaluated (T, p), in SI. */
export interface SolidGibbs {
  g: number;
  gT: number;
  gp: number;
  gTT: number;
  gTp: number;
  gpp: number;
}

/** Evaluates a solid's Gibbs equation at T (K) and p (Pa) into one record that is used again. */
export type SolidModel = (T: number, p: number) => Readonly<SolidGibbs>;
