/** Hazards a step or a tool may carry; each needs its own valid sign-off. */
export const HAZARDS = ['hot-glue', 'cutting', 'solvent-spray', 'ladder', 'overhead'] as const;
export type Hazard = (typeof HAZARDS)[number];

/** Plain names of the hazards, as they stand in a sentence. */
export const HAZARD_LABELS: Record<Hazard, string> = {
  'hot-glue': 'hot glue',
  cutting: 'cutting',
  'solvent-spray': 'solvent spray',
  ladder: 'ladder',
  overhead: 'overhead work',
};

/** Age bands, oldest first; the muster desk confirms the band, never a date of birth. */
export const AGE_BANDS = ['18+', '16-17', '13-15', '9-12', 'under-9'] as const;
export type AgeBand = (typeof AGE_BANDS)[number];

/** Plain names of the age bands. */
export const AGE_BAND_LABELS: Record<AgeBand, string> = {
  '18+': '18 and over',
  '16-17': '16-17',
  '13-15': '13-15',
  '9-12': '9-12',
  'under-9': 'under 9',
};

/** The youngest age in full years that a band holds, for sentences such as "16 and over". */
export const AGE_BAND_FROM: Record<AgeBand, number> = {
  '18+': 18,
  '16-17': 16,
  '13-15': 13,
  '9-12': 9,
  'under-9': 0,
};

/** Whether everybody in the band is under 18 and so needs an adult on site. */
export const isMinor = (band: AgeBand): boolean => band !== '18+';

/**
 * Whether everybody in a band is old enough for a rule that starts at another band.
 * @param band the person's confirmed band
 * @param from the youngest band the rule allows
 * @returns true when `band` is `from` or older
 */
export const oldEnough = (band: AgeBand, from: AgeBand): boolean =>
  AGE_BANDS.indexOf(band) <= AGE_BANDS.indexOf(from);

/** Words for the client's message catalogue: a key, and what stands in its gaps. */
export interface Message {
  key: string;
  params: Record<string, string | number>;
}
