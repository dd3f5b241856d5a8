/** What the numbers of the bench are, a plain sentence or two each. */
export const EXPLANATIONS = {
  bin: 'The bin under the reading line, from its lower edge to its upper one; the lower edge belongs to it, the upper one to the next.',
  counts:
    'How many times the coordinate was seen in this bin, as the file says, correlated samples included.',
  share: 'The part of the whole distribution that lies in this bin; the file holds no counts.',
  independent:
    'Counts of this bin divided by the statistical inefficiency g: how many independent samples it stands for.',
  residual:
    'Independent samples in this bin less what U predicts, in units of their error. About one bin in twenty may lie beyond ±2.',
  energy: 'The potential here, with its least value 0, and half the width of its 95 % band.',
  thermal: 'The same energy in units of kT at the temperature of the distribution.',
  force: 'Minus the slope of the potential: the force along the coordinate, as the table has it.',
  comparison:
    'The energy the same distribution gives when the Jacobian is treated the other way, for comparison only.',

  jacobian:
    'Larger distances and angles near 90° have more room. Each bin is divided by its exact share of that room, so that U holds the preference of the chain and not the geometry.',
  lambda:
    'How strongly changes of curvature are penalised. Small λ follows every bin, large λ ends in a harmonic or flat curve; the mark shows where the criterion sits.',
  tailStiffness:
    'Least curvature of U where the data end, as a multiple of kT over the variance of the data: the tail can never turn down.',
  cap: 'The table levels off at this energy, without a jump of the force; leave it empty for none.',
  straightAngle:
    'Free follows the data at 180°. Level makes the slope vanish there, so that the force does not jump when the angle passes through straight.',

  allCounts: 'All counts of the distribution, correlated samples included.',
  inefficiency:
    'How many counts make one independent sample. Counts are divided by it; without that the error band would be too narrow by its root.',
  independentSamples:
    'Counts divided by g. The band, λ and AIC all rest on this number. State it when you know it better.',
  effectiveDimension:
    'How many free parameters the smooth curve amounts to; the number of bins would follow every one of them.',
  basins:
    'Minima of the smooth curve whose way out is higher than the depth asked for and than two of its standard deviations.',
  barrier:
    'From the bottom of the basin to the top of the lowest way into a deeper one, ± one standard deviation.',
  barriers: 'From the bottom of each of the two basins to the top between them.',
  depth:
    'A basin counts from this depth on. At 0.5 kT the wells of pure noise are mostly gone; it is our default.',
  lowest: 'Where the potential in the table is least.',

  form: 'What the table is written from: the smooth curve itself, or one of the analytic forms, each fitted to the counts by maximum likelihood.',
  deltaAic:
    'Akaike’s criterion above the best of the list: 2 for each parameter, less twice the log-likelihood. Differences below about 4 mean little, above 10 a lot.',
  largestDeviation:
    'The largest difference from the smooth curve where the data live, in kT: what the table loses with this form.',
  parameter: 'Best value by maximum likelihood, ± one standard error, as if the form were true.',

  amplitude: 'Highest less lowest U over the bins that hold data, ± one standard deviation.',
  divergence:
    'How far the measured distribution is from a flat one, in nats; by chance alone a flat one shows the second number.',
  likelihoodRatio:
    'How often a flat dihedral would look at least this uneven with as many independent samples.',
} as const
