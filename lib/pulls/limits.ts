/** Bounds of what a hand can type on the pull sheet; the form says them before they are broken. */
export const VOLUME_ML = { min: 10, max: 5000 } as const;
export const TEMPERATURE_C = { min: -5, max: 40 } as const;

/** Seconds that sanitising alcohol is given to evaporate: the least that is taken, and what the clock is set to (common practice). */
export const EVAPORATION_S = { min: 30, usual: 60 } as const;
