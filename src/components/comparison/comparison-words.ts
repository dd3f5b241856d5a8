import type { ComparedMapping, ComparedTerm } from '@shared/contracts/comparison'
import { estimateGain } from '@shared/mapping'
import { coordinateFromInternal, unitSymbol, type AngleUnit, type LengthUnit } from '@shared/units'
import { significantText } from '@/components/figure/number-text'
import { countOf, formatCount } from '@/format/numbers'

/** The rows of a comparison, in their order. */
export const ROWS = [
  'beads',
  'terms',
  'coverage',
  'bond',
  'angle',
  'dihedral',
  'droppable',
  'coupling',
  'degrees',
  'cost',
] as const
export type ComparisonRow = (typeof ROWS)[number]

export const ROW_TITLES: Readonly<Record<ComparisonRow, string>> = {
  beads: 'Beads per unit',
  terms: 'Terms in use',
  coverage: 'Data at this state point',
  bond: 'Bonds',
  angle: 'Angles',
  dihedral: 'Dihedrals',
  droppable: 'Dihedrals that may be dropped',
  coupling: 'Correlation left behind',
  degrees: 'Degrees of freedom',
  cost: 'Cost',
}

/** What a column of numbers under a row's title means. */
export function rowNote(row: ComparisonRow, mappings: readonly ComparedMapping[]): string {
  if (row === 'bond' || row === 'angle' || row === 'dihedral') {
    const depth = depthOf(mappings)
    const width =
      row === 'dihedral'
        ? 'standard deviation on the circle, above some 100° hardly any preference'
        : 'standard deviation'
    return depth === null ? width : `basins deeper than ${depth} kT; ${width}`
  }
  if (row === 'coupling') return 'mutual information of pairs that share a bead'
  if (row === 'degrees') return 'per repeat unit'
  if (row === 'cost') return 'estimated'
  return ''
}

/** The depth in kT that basins were asked at; null where nobody counted. */
function depthOf(mappings: readonly ComparedMapping[]): number | null {
  return mappings.flatMap(({ terms }) => terms).find(({ basins }) => basins !== null)?.basins?.depth ?? null
}

/** The terms in use by kind: "3 bonds, 4 angles, 3 dihedrals". */
export function termCounts({ terms, leftOut }: ComparedMapping): string {
  if (terms.length === 0) return leftOut === 0 ? 'none' : `none, ${leftOut} left out`
  const count = (kind: ComparedTerm['kind']): number => terms.filter((term) => term.kind === kind).length
  const counts = [
    countOf(count('bond'), 'bond'),
    countOf(count('angle'), 'angle'),
    countOf(count('dihedral'), 'dihedral'),
  ].join(', ')
  return leftOut === 0 ? counts : `${counts}; ${leftOut} left out`
}

/** Whether a term has one peak, as far as anybody counted. */
export function peaksText({ kind, basins, coverage }: ComparedTerm): string {
  if (coverage === 'unfit') return 'no longer fits'
  if (coverage !== 'here') return coverage === 'elsewhere' ? 'only elsewhere' : 'no data'
  if (basins === null) return 'not counted'
  if (basins.count <= 1) return kind === 'dihedral' ? '1 basin' : 'single-peaked'
  return `${basins.count} basins`
}

/** A bond or an angle with several basins: a sign that its beads sit badly. A dihedral has several by its nature. */
export function isManyPeaked({ kind, basins }: ComparedTerm): boolean {
  return kind !== 'dihedral' && basins !== null && basins.count > 1
}

/** The width of a distribution in the reader's unit; empty where there is none. */
export function widthText(
  { kind, deviation }: Pick<ComparedTerm, 'kind' | 'deviation'>,
  units: { readonly length: LengthUnit; readonly angle: AngleUnit },
): string {
  if (deviation === null) return ''
  const unit = kind === 'bond' ? units.length : units.angle
  const value = significantText(coordinateFromInternal(deviation, unit), 2, 4)
  return unit === 'degree' ? `${value}°` : `${value}\u00a0${unitSymbol(unit)}`
}

/** How much work a mapping is beside the coarsest one, and what that assumes. */
export function costWords(
  { numbers, cost }: ComparedMapping,
  coarsest: ComparedMapping | undefined,
): { readonly text: string; readonly sentence: string } | null {
  if (numbers === null || cost === null || !coarsest?.numbers) return null
  const assumed =
    'Pairs of beads within one cutoff at one density go as the square of the number of beads; bonded terms and charges are not counted.'
  if (cost === 1) return { text: 'fewest pairs per step', sentence: assumed }
  const ratio = `(${numbers.beads}/${coarsest.numbers.beads})²`
  return {
    text: `${significantText(cost, 2)} times the pairs per step of ${coarsest.name}`,
    sentence: `${ratio} = ${significantText(cost, 2)}. ${assumed}`,
  }
}

/** The estimated gain over all atoms, and what it assumes. */
export function gainWords({
  numbers,
}: ComparedMapping): { readonly text: string; readonly sentence: string } | null {
  if (numbers === null) return null
  const { total, sentences } = estimateGain(numbers.reduction)
  return {
    text: `about ${formatCount(Number(total.toPrecision(2)))} times less work than all atoms`,
    sentence: sentences.join(' '),
  }
}

/** The mapping with the fewest beads, which costs are relative to. */
export function coarsestOf(mappings: readonly ComparedMapping[]): ComparedMapping | undefined {
  return mappings.find(({ cost }) => cost === 1)
}
