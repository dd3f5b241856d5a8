import { LEAST_BASIN_DEPTH } from '../basins'
import type { SheetLine } from '../contracts/data-sheet'
import type { DerivedPotential, FormName } from '../forms'
import { type InefficiencySource, LEAST_BLOCKS } from '../histogram'
import { listWords } from '../mapping/list-words'
import { GAS_CONSTANT } from '../units'
import { fixedWords, numberWords } from './number-words'
import { References } from './sheet-references'
import type { SheetSource } from './sheet-source'

/** How the tables were made, so that a reader can make them again, with the published methods it rests on. */
export function sheetMethods(source: SheetSource): { methods: SheetLine[]; references: string[] } {
  const works = new References()
  const singles = source.tables.flatMap(({ name, single }) => (single ? [{ name, ...single }] : []))
  const lines: (SheetLine | null)[] = [
    inversionLine(source, singles, works),
    smoothingLine(singles, works),
    samplesLine(singles, works),
    tableLine(singles),
    formLine(singles, works),
    jointLine(source),
    verdictLine(source),
    basinLine(source, works),
    massLine(works),
  ]
  return { methods: lines.filter((line) => line !== null), references: works.list() }
}

type Single = DerivedPotential & { readonly name: string }

function inversionLine({ tables }: SheetSource, singles: readonly Single[], works: References): SheetLine {
  const kinds = new Set(tables.flatMap((table) => table.kinds))
  const volumes = [
    kinds.has('bond') && '(q2³\u00a0−\u00a0q1³)/3 for a bond',
    kinds.has('angle') && 'cos\u00a0q1\u00a0−\u00a0cos\u00a0q2 for an angle',
    kinds.has('dihedral') && 'q2\u00a0−\u00a0q1 for a dihedral',
  ].filter((part) => part !== false)
  const off = singles.filter(({ inversion }) => !inversion.jacobian).map(({ name }) => name)
  const plain =
    off.length === 0
      ? ''
      : ` ${listWords(off)} ${off.length === 1 ? 'was' : 'were'} divided by the width of the bins only.`
  return {
    title: 'Inversion',
    text: `Boltzmann inversion with the volume element ${works.cite('tschoep', 'reith')}: a bin from q1 to q2 that holds the share p of the samples gives U = −kT ln(p/V), with the exact volume of the bin as V, ${listWords(volumes)}. The constant makes the least energy 0; the gas constant is ${numberWords(1000 * GAS_CONSTANT, 9)} J/mol/K.${plain}`,
  }
}

function smoothingLine(singles: readonly Single[], works: References): SheetLine | null {
  const smooth = singles.filter(({ inversion }) => inversion.smoothing.lambda !== null)
  const rough = singles.filter(({ inversion }) => inversion.smoothing.lambda === null).map(({ name }) => name)
  const rest =
    rough.length === 0
      ? ''
      : `${listWords(rough)} ${rough.length === 1 ? 'was' : 'were'} inverted bin by bin, without smoothing.`
  if (smooth.length === 0) return rest === '' ? null : { title: 'Smoothing', text: rest }
  const penalised = works.cite('eilersMarx', 'eilers')
  const choices = [...new Set(smooth.map(({ inversion }) => inversion.smoothing.criterion))].map(
    (criterion) =>
      criterion === null
        ? 'by hand'
        : criterion === 'aic'
          ? `by the least AIC ${works.cite('akaike')}`
          : `by marginal likelihood with the Fellner–Schall update ${works.cite('woodFasiolo')}`,
  )
  return {
    title: 'Smoothing',
    text: `Counts are Poisson with mean V exp(η), and U = −kT η. Their log-likelihood, less λ/2 times the sum of squared third differences of η from bin to bin (around the turn for a dihedral), is made largest ${penalised}; λ was chosen ${listWords(choices)}. A bin holds the mean of the curve over its width, not the value in its middle: V is replaced by its integral with the current curve until nothing changes ${works.cite('thompsonBaker', 'eilersComposite')}. Effective dimension and band come from the inverse of the penalised Hessian; the band is 1.96 standard deviations of U less its least value. ${rest}`.trim(),
  }
}

const SOURCES: Readonly<Record<InefficiencySource, string>> = {
  stated: 'was stated by the modeller',
  'independent samples': 'follows from the stated number of independent samples',
  'time blocks': 'was measured from the scatter between blocks of time',
  chains: 'was measured from the scatter between chains',
  assumed: 'was not measured: every count was taken as an independent sample, so errors may be too small',
}

function samplesLine(singles: readonly Single[], works: References): SheetLine | null {
  const bySource = new Map<InefficiencySource, string[]>()
  for (const { name, inversion } of singles) {
    const source = inversion.inefficiency?.source
    if (source) bySource.set(source, [...(bySource.get(source) ?? []), name])
  }
  if (bySource.size === 0) return null
  const blocks = bySource.has('time blocks')
    ? ` Neighbouring blocks, at least ${LEAST_BLOCKS} of them, are merged until g no longer grows ${works.cite('flyvbjerg')}.`
    : ''
  const sentences = [...bySource].map(
    ([source, names]) =>
      `${bySource.size === 1 ? 'Here g' : `For ${listWords(names)} g`} ${SOURCES[source]}.`,
  )
  return {
    title: 'Samples',
    text: `Counts are divided by the statistical inefficiency g; N is what is left. ${sentences.join(' ')}${blocks}`,
  }
}

function tableLine(singles: readonly Single[]): SheetLine | null {
  const curves = singles.filter(({ form }) => form === null)
  if (curves.length === 0) return null
  const stiffness = [...new Set(curves.map(({ inversion }) => inversion.settings.tails.stiffness))]
  const tails = curves.some(({ inversion }) => inversion.kind !== 'dihedral')
    ? ` Beyond the data a bond or an angle goes on quadratically with a curvature of at least ${listWords(stiffness.map((value) => numberWords(value, 3)))} kT over the variance of the data, so that it never turns down.`
    : ''
  return {
    title: 'Tables',
    text: `A cubic spline runs through the energies at the middles of the bins; energies and forces of a table are values and slopes of that one spline.${tails}`,
  }
}

function formLine(singles: readonly Single[], works: References): SheetLine | null {
  const forms = singles.flatMap(({ form }) => (form === null ? [] : [form.form]))
  if (forms.length === 0) return null
  const cited = (name: FormName): string =>
    name === 'cosine-powers'
      ? ` ${works.cite('ryckaert')}`
      : name === 'gaussians'
        ? ` ${works.cite('milano')}`
        : ''
  const names = [...new Set(forms)].map((name) => `${name}${cited(name)}`)
  return {
    title: 'Forms',
    text: `Analytic forms (${listWords(names)}) were fitted to the counts by maximum likelihood, with the probability of each bin as the integral of J exp(−U/kT) over it; standard errors come from the Fisher information.`,
  }
}

function jointLine({ tables }: SheetSource): SheetLine | null {
  if (tables.every(({ joint }) => joint === null)) return null
  return {
    title: 'Joint tables',
    text: 'U(x, y) = −kT ln(p/V) with the product of both volumes as V, smoothed in the same way by a tensor product of cubic B-splines with one λ for each axis.',
  }
}

function verdictLine({ pairs }: SheetSource): SheetLine | null {
  if (pairs.length === 0) return null
  return {
    title: 'Verdicts',
    text: 'The mutual information of two terms is the mean cost, in kT, of taking them as independent. It is measured on a grid merged to at least five effective counts a cell on average and lessened by the mean of tables drawn at random with the same margins; those tables give p as well. A joint potential is advised when it is above the threshold of the group and chance is excluded at p < 0.01, or when the map has basins that independent terms would not make.',
  }
}

function basinLine({ tables }: SheetSource, works: References): SheetLine | null {
  if (tables.every(({ basins }) => basins === null)) return null
  return {
    title: 'Basins',
    text: `Counted by topological persistence ${works.cite('edelsbrunner')}: a basin is deeper than ${fixedWords(LEAST_BASIN_DEPTH, 1)} kT and than two standard deviations of its depth.`,
  }
}

function massLine(works: References): SheetLine {
  return {
    title: 'Masses',
    text: `From the abridged standard atomic weights of 2021 ${works.cite('prohaska')}, with all hydrogens.`,
  }
}
