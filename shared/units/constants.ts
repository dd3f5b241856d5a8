/**
 * Molar gas constant in kJ/mol/K: exact product of the Boltzmann and Avogadro constants of the 2019 SI (CODATA 2018).
 */
export const GAS_CONSTANT = 8.31446261815324e-3

/** Thermochemical calorie: 1 kcal = 4.184 kJ, by definition. */
export const KILOJOULES_PER_KILOCALORIE = 4.184

export const DEGREES_PER_RADIAN = 180 / Math.PI

export const ANGSTROMS_PER_NANOMETRE = 10
