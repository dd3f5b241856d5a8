import type { Inversion } from './inversion'
import { tableDomain } from './table-domain'
import type { Warning } from './warning'
import { extentWords } from './warning-words'

/** Rounding that a bound may lie inside the data. */
const BOUND_SLACK = 1e-9

/** Doubts about the table: more extrapolation than data, bounds or a cap inside the data, rows too far apart. */
export function tableWarnings(inversion: Omit<Inversion, 'warnings'>, kT: number): Warning[] {
  const { kind, potential, settings, bins } = inversion
  const [low, high] = tableDomain(kind, potential, settings.table)
  const [first, last] = potential.populated
  const inside = Math.max(0, Math.min(high, last) - Math.max(low, first))
  const outside = high - low - inside
  const warnings: Warning[] = []
  if (outside > inside) {
    warnings.push({
      code: 'EXTRAPOLATION_DOMINATES',
      message: `The table covers ${extentWords(kind, inside)} with data and ${extentWords(kind, outside)} without: most of it is extrapolated.`,
      action: 'Trust the table only where there are data; narrow its range if the other program allows it.',
    })
  }
  if (low > first + BOUND_SLACK || high < last - BOUND_SLACK) {
    warnings.push({
      code: 'TABLE_CUTS_DATA',
      message: `The table leaves out ${extentWords(kind, last - first - inside)} of the measured range.`,
      action: 'Widen the table, or it stops where chains really go.',
    })
  }
  const spacing = (high - low) / (settings.table.rows - 1)
  const width = (bins.edges[bins.edges.length - 1] - bins.edges[0]) / bins.weights.length
  if (spacing > width) {
    warnings.push({
      code: 'TABLE_TOO_COARSE',
      message: `The rows are ${extentWords(kind, spacing)} apart, wider than the bins of ${extentWords(kind, width)}: the table blurs what was measured.`,
      action: `Use at least ${Math.ceil((high - low) / width) + 1} rows.`,
    })
  }
  return [...warnings, ...capInData(inversion, kT)]
}

function capInData({ settings, bins, rawOffset }: Omit<Inversion, 'warnings'>, kT: number): Warning[] {
  const { cap } = settings.table
  if (cap === null) return []
  const total = bins.weights.reduce((sum, weight) => sum + weight, 0)
  const above = bins.weights.reduce(
    (sum, weight, bin) => (bins.rawEnergies[bin] + rawOffset > cap - kT ? sum + weight : sum),
    0,
  )
  if (above === 0) return []
  return [
    {
      code: 'CAP_IN_DATA',
      message: `The cap of ${cap} kJ/mol flattens energies that were measured: ${((100 * above) / total).toPrecision(2)} % of the samples lie there.`,
      action: 'Raise the cap above the energies of all filled bins.',
    },
  ]
}
