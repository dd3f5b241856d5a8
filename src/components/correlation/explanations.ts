/** What the numbers of the correlation room are, a plain sentence or two each. */
export const EXPLANATIONS = {
  information:
    'Mutual information, less what unrelated terms of this sample size show by chance, with half its 95 % interval. In nats it is the mean cost, in kT, of treating the two terms as independent.',
  nullLevel:
    'One in a hundred tables of unrelated terms with the same two distributions and sample size shows more than this; p is the share that shows as much as was measured.',
  largestCoupling:
    'The largest preference or avoidance of a pair of values beyond what the two distributions alone give, among cells with enough samples; where the sample size is known, with half its 95 % interval.',
  totalVariation:
    'The share of the configurations that two independent tables would put elsewhere; unrelated terms show some of it by chance.',
  coefficients:
    'Linear and rank correlation. Both can be 0 while the two are far from independent, so neither decides.',
  basins:
    'Minima of the free energy deeper than max(0.5 kT, 2σ), in the map and in the product of the two distributions. Only basins that the product lacks speak for a joint potential.',
  millerMadow:
    'Mutual information on the bins of the file with the first-order correction. With few samples on a fine grid it is too large; the verdict does not rest on it.',
  samples:
    'How many independent samples the verdict rests on: counts divided by the statistical inefficiency.',
} as const
