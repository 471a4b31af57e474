/** A wood that dowels are made of. */
export type Species = {
  key: string;
  name: string;
  /** Oven-dry mass over volume at 12 % moisture. */
  specificGravity: number;
  /** Whether the figure was read in the source or is from memory. */
  source: string;
};

const HANDBOOK = 'Wood Handbook, USDA FPL-GTR-282, table 5-3, from memory';

/**
 * Woods of dowels. A handbook's specific gravity is no density: it leaves out the water, see `densityOf`.
 */
export const SPECIES: readonly Species[] = [
  { key: 'birch-yellow', name: 'birch, yellow', specificGravity: 0.62, source: HANDBOOK },
  { key: 'birch-paper', name: 'birch, paper', specificGravity: 0.55, source: HANDBOOK },
  { key: 'beech', name: 'beech', specificGravity: 0.64, source: HANDBOOK },
  { key: 'maple-sugar', name: 'maple, sugar', specificGravity: 0.63, source: HANDBOOK },
  { key: 'oak-red', name: 'oak, northern red', specificGravity: 0.63, source: HANDBOOK },
  { key: 'ash-white', name: 'ash, white', specificGravity: 0.6, source: HANDBOOK },
  { key: 'poplar-yellow', name: 'poplar, yellow', specificGravity: 0.42, source: HANDBOOK },
  { key: 'basswood', name: 'basswood', specificGravity: 0.37, source: HANDBOOK },
  { key: 'pine-white', name: 'pine, eastern white', specificGravity: 0.35, source: HANDBOOK },
  { key: 'spruce-sitka', name: 'spruce, Sitka', specificGravity: 0.4, source: HANDBOOK },
  {
    key: 'bamboo',
    name: 'bamboo (not in the handbook)',
    specificGravity: 0.6,
    source: 'common practice, no source',
  },
];

/** Water in wood at 12 % moisture: the mass is 1.12 times the oven-dry one. */
const WITH_WATER = 1.12;

/**
 * Density of a wood at 12 % moisture, kg per cubic metre.
 * @param key of `SPECIES`; an unknown one counts as the first, so that a drawing always has a mass
 * Source: Wood Handbook, chapter 4: density is specific gravity times 1000 times (1 + moisture).
 */
export function densityOf(key: string): number {
  const species = SPECIES.find((one) => one.key === key) ?? SPECIES[0];
  return (species?.specificGravity ?? 0.6) * WITH_WATER * 1000;
}

/**
 * Mass of a round stick, kg.
 * @param lengthMm length in mm
 * @param diameterMm diameter in mm
 * @param density kg per cubic metre
 */
export const stickKg = (lengthMm: number, diameterMm: number, density: number): number =>
  (Math.PI / 4) * diameterMm ** 2 * lengthMm * density * 1e-9;

/**
 * Surface of a round stick that paint reaches, square metres: round about, not the ends, which sit in glue.
 * @param lengthMm length in mm
 * @param diameterMm diameter in mm
 */
export const stickSurface = (lengthMm: number, diameterMm: number): number =>
  Math.PI * diameterMm * lengthMm * 1e-6;
