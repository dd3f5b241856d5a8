/** Repeat units that the mapping board must serve, by name. */
export const POLYMERS = {
  'poly(n-hexyl acrylate)': '*CC(*)C(=O)OCCCCCC',
  'poly(methyl methacrylate)': '*CC(*)(C)C(=O)OC',
  'poly(ethylene terephthalate)': '*OC(=O)c1ccc(cc1)C(=O)OCC*',
  'bisphenol A polycarbonate': '*Oc1ccc(cc1)C(C)(C)c1ccc(cc1)OC(*)=O',
  'polyamide 6': '*NC(=O)CCCCC*',
  'polyamide 6,6': '*NC(=O)CCCCC(=O)NCCCCCC*',
  polystyrene: '*CC(*)c1ccccc1',
  'poly(ethylene oxide)': '*CCO*',
  'poly(dimethyl siloxane)': '*[Si](C)(C)O*',
  'poly(3-hexylthiophene)': '*c1cc(CCCCCC)c(*)s1',
  'poly(vinyl alcohol)': '*CC(*)O',
  'poly(vinyl acetate)': '*CC(*)OC(C)=O',
  'poly(lactic acid)': '*OC(C)C(*)=O',
} as const
