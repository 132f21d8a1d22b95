/**
 * Ice below this number density, ten particles in a cubic kilometre, counts as none: no flux leaves such a
 * cell, on either side of the account. It lies below every tolerance of the solver. 1/m3.
 */
export const NO_ICE = 1e-8
