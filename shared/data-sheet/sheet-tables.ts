import type { SheetGlyphBead, SheetNumbers, SheetTable } from '../contracts/data-sheet'
import type { FrozenHandOver } from '../contracts/hand-over'
import { type CoordinateKind, coordinateFromInternal, unitSymbol } from '../units'
import { coordinateUnitOf, curveFigure } from './curve-figure'
import { mapFigure } from './map-figure'
import { fixedWords, numberWords } from './number-words'
import { dimensionWords, lambdaWords, samplesWords } from './sheet-evidence'
import type { SheetSource, SourceTable } from './sheet-source'

/** The tables as the sheet lists and draws them. */
export function sheetTables({ frozen, tables }: Pick<SheetSource, 'frozen' | 'tables'>): SheetTable[] {
  return tables.map((table): SheetTable => {
    const { name, kinds, types, path, size, sha256, silhouette } = table
    const numbers = sheetNumbers(table)
    const axes = [table.coordinates, ...(table.secondCoordinates === null ? [] : [table.secondCoordinates])]
    const { layout } = frozen
    return {
      name,
      kinds: [...kinds],
      beads: types.map((sequence) => glyphBeads(frozen, sequence)),
      path,
      size,
      sha256,
      domain: axes.map((axis, at) => spanWords(kinds[at], [axis[0], axis[axis.length - 1]], layout)),
      rows:
        axes.length === 1
          ? `${axes[0].length} rows`
          : `${axes.map((axis) => axis.length).join(' × ')} points`,
      lowest: table.lowestAt.map((at, axis) => placeWords(kinds[axis], at, layout)).join(', '),
      silhouette: [...silhouette],
      numbers,
      curve: table.single && curveFigure(table.single, layout),
      map: table.joint && mapFigure({ ...table, joint: table.joint }, layout),
      caption: captionWords(table, numbers),
    }
  })
}

/** The beads of a sequence of types, each the first of its type. */
export function glyphBeads(
  { mapping }: Pick<FrozenHandOver, 'mapping'>,
  types: readonly string[],
): SheetGlyphBead[] {
  return types.map((type) => {
    const bead = mapping.document.beads.find((each) => each.type === type)
    return bead ? { name: bead.name, colour: bead.colour } : { name: type.slice(0, 2), colour: null }
  })
}

function sheetNumbers({ single, joint, basins, input }: SourceTable): SheetNumbers {
  if (joint !== null) {
    const { independentSamples, smoothing } = joint.potential
    return {
      samples: independentSamples,
      inefficiency: null,
      log10Lambda: [...smoothing.log10Lambdas],
      effectiveDimension: smoothing.effectiveDimension,
      basins: null,
      input,
    }
  }
  const { independentSamples, inefficiency, smoothing } = single!.inversion
  return {
    samples: independentSamples,
    inefficiency: inefficiency?.value ?? null,
    log10Lambda: smoothing.log10Lambda === null ? null : [smoothing.log10Lambda],
    effectiveDimension: smoothing.effectiveDimension,
    basins,
    input,
  }
}

function captionWords({ single }: SourceTable, numbers: SheetNumbers): string {
  const { samples, log10Lambda, effectiveDimension, basins } = numbers
  const parts = [samplesWords(samples)]
  if (single?.form) parts.push(`form ${single.form.form}`)
  else if (log10Lambda === null) parts.push('not smoothed')
  else
    parts.push(
      `log λ = ${lambdaWords(log10Lambda)}`,
      `effective dimension ${dimensionWords(effectiveDimension)}`,
    )
  if (basins !== null) parts.push(`${basins} basin${basins === 1 ? '' : 's'}`)
  return parts.join(', ')
}

type Units = FrozenHandOver['layout']

/** The range of an axis with its unit: 0.120–0.480 nm, −180 to 180°. */
function spanWords(kind: CoordinateKind, [low, high]: readonly [number, number], units: Units): string {
  const [from, to] = [low, high].map((at) => coordinateWords(kind, at, units))
  const suffix = unitSuffix(kind, units)
  return low < 0 ? `${from} to ${to}${suffix}` : `${from}–${to}${suffix}`
}

function placeWords(kind: CoordinateKind, at: number, units: Units): string {
  return `${coordinateWords(kind, at, units)}${unitSuffix(kind, units)}`
}

function coordinateWords(kind: CoordinateKind, at: number, units: Units): string {
  const unit = coordinateUnitOf(kind, units)
  const value = coordinateFromInternal(at, unit)
  if (unit === 'degree') return numberWords(Number(value.toFixed(1)), 6)
  return fixedWords(value, unit === 'angstrom' ? 2 : 3)
}

function unitSuffix(kind: CoordinateKind, units: Units): string {
  const symbol = unitSymbol(coordinateUnitOf(kind, units))
  return symbol === '°' ? symbol : `\u00a0${symbol}`
}
