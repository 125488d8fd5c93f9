import { medium, type Medium } from '../../core/equilibrium/medium.ts';
import { catalogue } from '../../core/substances/catalogue.ts';

/** Every substance of the catalogue, made ready; a new one meets all laws by being listed there. */
export const media: readonly Medium[] = (
  await Promise.all(catalogue.map(({ load }) => load()))
).map(medium);
